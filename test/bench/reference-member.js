/**
 * The member of the table: 20 segments of contrast 10 in stiffness and inertia, a mass attached at
 * 0.437 of the length, fixed near end, spring at the far end. Fixed numbers, so that runs compare.
 */
export function referenceMember() {
  const segments = Array.from({ length: 20 }, (_, i) => ({
    length: 1 + 0.5 * Math.sin(1 + 2 * i),
    axialStiffness: 1e8 * 10 ** (0.5 + 0.5 * Math.sin(3 * i)),
    massPerLength: 10 * 10 ** (0.5 + 0.5 * Math.cos(5 * i)),
  }));
  const length = segments.reduce((sum, segment) => sum + segment.length, 0);
  return {
    kind: 'bar',
    segments,
    ends: { near: { type: 'fixed' }, far: { type: 'attached', spring: 1e7 } },
    attachments: [{ at: 0.437 * length, mass: 150 }],
  };
}

export function modesRequest(modes, extras = {}) {
  return { member: referenceMember(), series: { modes }, ...extras };
}

export function responsesRequest(modes, positions, times) {
  const member = referenceMember();
  const length = member.segments.reduce((sum, segment) => sum + segment.length, 0);
  return {
    member,
    initial: { displacement: { type: 'pull', at: 0.437 * length, amplitude: 1e-3 } },
    series: { modes },
    sample: {
      positions: { count: positions },
      times: times === 1 ? [0.01] : { start: 0, end: 0.05, count: times },
      quantities: ['displacement'],
    },
    checks: false,
  };
}
