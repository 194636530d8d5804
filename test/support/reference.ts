import { readFileSync } from 'node:fs';
import type { PlainMember } from './plain-member.ts';

/** One entry of a table under test/reference/; see its README for the conventions. */
export interface ReferenceEntry {
  readonly id: string;
  readonly description: string;
  readonly source: string;
  readonly source_seen: boolean;
  // oxlint-disable-next-line typescript/no-explicit-any -- every theme has its own inputs
  readonly inputs: any;
  // oxlint-disable-next-line typescript/no-explicit-any -- and its own results
  readonly expected: any;
  // oxlint-disable-next-line typescript/no-explicit-any -- printed values as they stand in print
  readonly published: any;
  readonly tolerance: string;
}

export type ReferenceTable =
  'uniform-ends' | 'piecewise-members' | 'modal-coefficients' | 'exact-fields' | 'truncation' | 'forced';

function read(name: string): { entries: unknown[] } {
  return JSON.parse(readFileSync(new URL(`../reference/${name}.json`, import.meta.url), 'utf8')) as {
    entries: unknown[];
  };
}

/** All entries of a table, in file order. */
export function referenceEntries(table: ReferenceTable): ReferenceEntry[] {
  return read(table).entries as ReferenceEntry[];
}

/** One entry by its id. */
export function referenceEntry(table: ReferenceTable, id: string): ReferenceEntry {
  const entry = referenceEntries(table).find((candidate) => candidate.id === id);
  if (entry === undefined) throw new Error(`no entry ${id} in ${table}`);
  return entry;
}

/** Frequencies (rad/s) to 32 digits of the entries whose inputs are taken as exact doubles, by id. */
export function enclosedFrequencies(): Map<string, string[]> {
  const entries = read('enclosed-frequencies').entries as { id: string; omega: string[] }[];
  return new Map(entries.map((entry) => [entry.id, entry.omega]));
}

/** A random member of test/reference/random-members.json with [order, frequency to 32 digits] pairs. */
export interface RandomMemberEntry {
  readonly id: string;
  readonly rigid_body_modes: number;
  readonly member: {
    readonly segments: readonly (readonly [number, number, number, number])[];
    readonly masses: readonly number[];
    readonly springs: readonly number[];
    readonly nearFixed: boolean;
    readonly farFixed: boolean;
  };
  readonly omega: readonly (readonly [number, string])[];
}

export function randomMemberEntries(): RandomMemberEntry[] {
  return read('random-members').entries as RandomMemberEntry[];
}

/** The member of a random entry as the oracles take it. */
export function plainMember(member: RandomMemberEntry['member']): PlainMember {
  return {
    ...member,
    segments: member.segments.map(([length, stiffness, inertia, foundation]) => ({
      length,
      stiffness,
      inertia,
      foundation,
    })),
  };
}

/** Energies of clusters of close frequencies for a polyline displacement (test/reference/pair-energies.json). */
export interface PairEnergyEntry {
  readonly id: string;
  readonly member: RandomMemberEntry['member'];
  readonly displacement: { readonly positions: readonly number[]; readonly values: readonly number[] };
  readonly energy: number;
  readonly clusters: readonly { readonly orders: readonly number[]; readonly energy: number }[];
}

export function pairEnergyEntries(): PairEnergyEntry[] {
  return read('pair-energies').entries as PairEnergyEntry[];
}
