/** Fields that are summed over modes; stress is force times a factor. */
export type FieldKind = 'displacement' | 'relativeDisplacement' | 'velocity' | 'acceleration' | 'force';
