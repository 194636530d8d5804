/** A uniform segment of the request as the wave equation sees it, whatever its kind and form. */
export interface SegmentProperties {
  /** Length in m. */
  readonly length: number;
  /** Stiffness k in N (N·m² for a shaft). */
  readonly stiffness: number;
  /** Inertia ρ in kg/m (kg·m for a shaft). */
  readonly inertia: number;
  /** Foundation s in N/m² (N for a shaft). */
  readonly foundation: number;
  /** Drag d in N·s/m² (N·s for a shaft). */
  readonly drag: number;
  /** Stress per unit of force in 1/m² (1/m³ for a shaft); 0 where the section is not given. */
  readonly stressFactor: number;
}
