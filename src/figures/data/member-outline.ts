import type { Member } from '../../spec/types.ts';
import { countOf, formatQuantity } from '../text/format-values.ts';

/** What stands at an end or a place of the member; anything of it may be absent. */
export interface Lump {
  readonly mass: boolean;
  readonly spring: boolean;
  readonly dashpot: boolean;
}

/** What a drawing of the member shows. */
export interface MemberOutline {
  /** m. */
  readonly length: number;
  /** Drawn upright: a column stands. */
  readonly upright: boolean;
  readonly near: 'fixed' | Lump;
  readonly far: 'fixed' | Lump;
  readonly attachments: readonly (Lump & { readonly at: number })[];
  /** Places where segments meet, m, ascending. */
  readonly boundaries: readonly number[];
  /** Names given to attachments (a place) and segments (a stretch), m. */
  readonly names: readonly { readonly from: number; readonly to: number; readonly name: string }[];
}

/** The outline of a member of a canonical request. */
export function outlineOf(member: Member): MemberOutline {
  const boundaries: number[] = [];
  const names: { from: number; to: number; name: string }[] = [];
  for (const { at, name } of member.attachments) {
    if (name !== undefined) names.push({ from: at, to: at, name });
  }
  let length = 0;
  for (const segment of member.segments) {
    if (segment.name !== undefined)
      names.push({ from: length, to: length + segment.length, name: segment.name });
    length += segment.length;
    boundaries.push(length);
  }
  boundaries.pop();
  return {
    length,
    upright: member.kind === 'shear-column',
    near: endOf(member.ends.near),
    far: endOf(member.ends.far),
    attachments: member.attachments.map((attachment) => ({ at: attachment.at, ...lumpOf(attachment) })),
    boundaries,
    names,
  };
}

/** The member in words: "Cable, 86.4 m, 2 segments". */
export function memberInWords(member: Member): string {
  const length = member.segments.reduce((sum, segment) => sum + segment.length, 0);
  const parts = [
    { cable: 'Cable', bar: 'Bar', shaft: 'Shaft', 'shear-column': 'Shear column', wave: 'Wave member' }[
      member.kind
    ],
    formatQuantity(length, 'm', 4),
  ];
  const count = member.segments.length;
  if (count > 1) parts.push(countOf(count, member.kind === 'shear-column' ? 'layer' : 'segment'));
  return parts.join(', ');
}

type EndLike = { readonly type: string } & LumpLike;

interface LumpLike {
  readonly mass?: number;
  readonly inertia?: number;
  readonly spring?: number;
  readonly dashpot?: number;
}

function endOf(end: EndLike): 'fixed' | Lump {
  return end.type === 'fixed' ? 'fixed' : lumpOf(end);
}

function lumpOf({ mass = 0, inertia = 0, spring = 0, dashpot = 0 }: LumpLike): Lump {
  return { mass: mass + inertia > 0, spring: spring > 0, dashpot: dashpot > 0 };
}
