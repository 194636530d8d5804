import type { Attachment, End, Member, ShaftAttachment, ShaftEnd } from '../spec/types.ts';

/** What stands at a node: mass in kg (kg·m²), spring in N/m (N·m/rad), dashpot in N·s/m (N·m·s/rad). */
export interface Lump {
  readonly mass: number;
  readonly spring: number;
  readonly dashpot: number;
}

const nothing: Lump = { mass: 0, spring: 0, dashpot: 0 };

/** The lump of an end; nothing at a fixed or free end. */
export function endLump(end: End | ShaftEnd): Lump {
  return end.type === 'attached' ? lump(end) : nothing;
}

/** The lumps of the attachments, in the order of the request. */
export function attachmentLumps(member: Member): Lump[] {
  return member.attachments.map((attachment: Attachment | ShaftAttachment) => lump(attachment));
}

type Carrier = { spring: number; dashpot: number } & ({ mass: number } | { inertia: number });

function lump(carrier: Carrier): Lump {
  return {
    mass: 'inertia' in carrier ? carrier.inertia : carrier.mass,
    spring: carrier.spring,
    dashpot: carrier.dashpot,
  };
}
