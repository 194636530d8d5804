import type {
  Attachment,
  Damping,
  End,
  InitialMotion,
  Member,
  ModesRequest,
  Quantity,
  ResponsesRequest,
  ShapesRequest,
} from '../../src/spec/types.ts';
import { nodePositions, type PlainMember } from './plain-member.ts';

function end(held: boolean, mass: number, spring: number): End {
  if (held) return { type: 'fixed' };
  return mass === 0 && spring === 0 ? { type: 'free' } : { type: 'attached', mass, spring, dashpot: 0 };
}

/** The canonical member of kind `wave` with the lumps of interior nodes as attachments. */
export function requestMember(plain: PlainMember, damping?: Damping): Member {
  const last = plain.segments.length;
  const positions = nodePositions(plain);
  const attachments: Attachment[] = [];
  for (let node = 1; node < last; node++) {
    const [mass, spring] = [plain.masses[node], plain.springs[node]];
    if (mass > 0 || spring > 0) attachments.push({ at: positions[node], mass, spring, dashpot: 0 });
  }
  return {
    kind: 'wave',
    segments: plain.segments.map((segment) => ({ ...segment, drag: 0 })),
    ends: {
      near: end(plain.nearFixed, plain.masses[0], plain.springs[0]),
      far: end(plain.farFixed, plain.masses[last], plain.springs[last]),
    },
    attachments,
    ...(damping === undefined ? {} : { damping }),
  };
}

/** A canonical modes request for the lowest `modes` modes. */
export function modesRequest(
  plain: PlainMember,
  modes: number,
  shapes?: Partial<ShapesRequest>,
): ModesRequest {
  return {
    member: requestMember(plain),
    series: { modes },
    energyShares: false,
    ...(shapes === undefined
      ? {}
      : {
          shapes: {
            positions: { count: 101 },
            normalisation: 'mass',
            quantities: ['displacement', 'force'],
            ...shapes,
          },
        }),
  };
}

/** What a responses request is made of here; SI numbers. */
export interface ResponseCase {
  readonly member: PlainMember;
  readonly damping?: Damping;
  readonly initial: InitialMotion;
  readonly modes: number;
  readonly positions: number[];
  readonly times: number[];
  readonly quantities: Quantity[];
  readonly gaugeTime?: number;
  readonly checks?: boolean;
}

/** A canonical responses request with a fixed number of modes. */
export function responsesRequest(given: ResponseCase): ResponsesRequest {
  return {
    member: requestMember(given.member, given.damping),
    initial: given.initial,
    loads: [],
    series: { modes: given.modes },
    sample: {
      positions: given.positions,
      times: given.times,
      quantities: given.quantities,
      gaugeTime: given.gaugeTime ?? 0,
    },
    checks: given.checks ?? false,
  };
}
