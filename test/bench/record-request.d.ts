export const record: {
  readonly interval: number;
  readonly samples: number;
  readonly instants: number;
  readonly stride: number;
  readonly modes: number;
  readonly stations: number;
};
export function recordRequest(quantities: readonly string[], checks: boolean): object;
export function recordModesRequest(): object;
