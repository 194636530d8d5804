/**
 * A member reduced to the wave equation ρ u_tt = (k u_x)_x − s u with lumps at its nodes.
 *
 * Node i stands between segment i − 1 and segment i; nodes 0 and n are the near and the far end.
 * All arrays are SI, never NaN or infinite. Segments have positive length and stiffness; inertia,
 * foundation, masses and springs are not negative, and inertia may be 0.
 */
export interface WaveMember {
  readonly kind: 'cable' | 'bar' | 'shaft' | 'shear-column' | 'wave';
  /** Number of segments n ≥ 1 after splitting at attachments. */
  readonly segmentCount: number;
  /** Segment lengths in m, shape [n]. */
  readonly length: Float64Array;
  /** Stiffness k per segment (N, or N·m² for a shaft), shape [n]. */
  readonly stiffness: Float64Array;
  /** Inertia ρ per segment (kg/m, or kg·m for a shaft), shape [n]. */
  readonly inertia: Float64Array;
  /** Foundation s per segment (N/m², or N for a shaft), shape [n]. */
  readonly foundation: Float64Array;
  /** Stress per unit of force (1/m², or 1/m³ for a shaft) per segment; 0 where no section is given. */
  readonly stressFactor: Float64Array;
  /** Index of the segment in the request that each segment came from, shape [n]. */
  readonly origin: Int32Array;
  /** Position of the nodes in m from the near end, shape [n + 1], ascending, first 0. */
  readonly position: Float64Array;
  /** Lumped mass per node (kg, or kg·m²), shape [n + 1]; 0 at fixed ends. */
  readonly mass: Float64Array;
  /** Spring to ground per node (N/m, or N·m/rad), shape [n + 1]; 0 at fixed ends. */
  readonly spring: Float64Array;
  /** Whether the ends are held. */
  readonly nearFixed: boolean;
  readonly farFixed: boolean;
  /** Node at which each attachment of the request stands, shape [attachments]; several may share one. */
  readonly attachmentNode: Int32Array;
  /** Spring of each attachment of the request (N/m, or N·m/rad), shape [attachments]. */
  readonly attachmentSpring: Float64Array;
  /** Damping that leaves the modes uncoupled. */
  readonly damping: ModalDamping;
}

/**
 * Modal damping: q″ + (massCoefficient + 2 ζ_n ω_n + stiffnessCoefficient ω_n²) q′ + ω_n² q = 0.
 * Uniform drag d = α ρ on a member without node masses adds α to massCoefficient.
 */
export interface ModalDamping {
  /** ζ_1, ζ_2, …; the last one serves all higher modes; empty means 0. */
  readonly ratios: readonly number[];
  /** α in 1/s. */
  readonly massCoefficient: number;
  /** β in s. */
  readonly stiffnessCoefficient: number;
}
