import type { WaveMember } from '../members/wave-member.ts';
import { ENDS, evaluateShape, waveNumberSquare, type ModeShape } from '../modes/mode-shape.ts';
import { nodeDisplacement } from '../modes/shape-figures.ts';
import type { InitialDisplacement } from './initial-displacement.ts';
import type { InitialVelocity } from './initial-velocity.ts';
import {
  derivativeOf,
  derivedPowers,
  isZero,
  nodeValuesOf,
  type Piece,
  type WaveTerm,
} from './piecewise-field.ts';
import { pieceTimesWave } from './wave-integrals.ts';

/** Initial state of one modal coordinate, for unit modal mass. */
export interface ModalStart {
  /** q_n(0) = a_n, √kg·m (shaft: √(kg·m²)·rad). */
  readonly position: number;
  /** q_n′(0), per s. */
  readonly velocity: number;
  /** ½(ω² a² + q′²), J. */
  readonly energy: number;
  /** Sum of the absolute terms of ω a and of q′, √J: the scale of their rounding. */
  readonly positionScale: number;
  readonly velocityScale: number;
}

/** A piece with what its integrals against waves need. */
interface Term {
  readonly piece: Piece;
  /** Largest |f| of the polynomial part and of each wave. */
  readonly height: number;
}

/**
 * Projects an initial state on the modes, in closed form:
 *
 *   ω_n² a_n = a(f, φ_n) = ΣF φ_n(z) + ∫ f′ p_n + ∫ s f φ_n + ΣK f φ_n,   q_n′(0) = ∫ρ g φ_n + ΣM v φ_n,
 *
 * and a_0 = m(f, φ_0) for a rigid-body mode. The strain form needs no cancellation at high modes.
 * Cost: O(pieces) a mode.
 */
export class ModalProjection {
  private readonly member: WaveMember;
  private readonly displacement: InitialDisplacement;
  private readonly velocity: InitialVelocity;
  private readonly given: Term[];
  private readonly slopes: Term[];
  private readonly speeds: Term[];
  private readonly nodes: Float64Array;
  private readonly pair = new Float64Array(2);

  constructor(member: WaveMember, displacement: InitialDisplacement, velocity: InitialVelocity) {
    this.member = member;
    this.displacement = displacement;
    this.velocity = velocity;
    const nonzero = displacement.pieces.filter((piece) => !isZero(piece));
    this.given = nonzero.map(termOf);
    this.slopes = nonzero
      .map(slopeOf)
      .filter((piece) => !isZero(piece))
      .map(termOf);
    this.speeds = velocity.pieces
      .filter((piece) => !isZero(piece) && member.inertia[piece.segment] > 0)
      .map(termOf);
    this.nodes = nodeValuesOf(displacement.pieces, member.segmentCount);
  }

  /** a_n, q_n′(0) and the mode's energy. */
  project(shape: ModeShape): ModalStart {
    const { member } = this;
    const { lambda } = shape;
    const omega = Math.sqrt(lambda);
    let velocity = 0;
    let velocityScale = 0;
    for (const term of this.speeds) {
      const rho = member.inertia[term.piece.segment];
      const wave = this.modeWave(shape, term.piece, false);
      velocity += rho * pieceTimesWave(term.piece, wave);
      velocityScale += rho * reach(term, wave);
    }
    for (let j = 0; j <= member.segmentCount; j++) {
      if (member.mass[j] === 0 || this.velocity.masses[j] === 0) continue;
      const part = member.mass[j] * this.velocity.masses[j] * nodeDisplacement(shape, j);
      velocity += part;
      velocityScale += member.mass[j] * Math.abs(this.velocity.masses[j]) * this.nodeAmplitude(shape, j);
    }
    if (lambda === 0) {
      const position = this.massProduct(shape);
      return { position, velocity, energy: 0.5 * velocity * velocity, positionScale: 0, velocityScale };
    }
    const [form, scale] = this.strainProduct(shape);
    return {
      position: form / lambda,
      velocity,
      energy: 0.5 * ((form * form) / lambda + velocity * velocity),
      positionScale: scale / omega,
      velocityScale,
    };
  }

  private strainProduct(shape: ModeShape): [number, number] {
    const { member, pair } = this;
    let form = 0;
    let scale = 0;
    for (const pull of this.displacement.pulls) {
      evaluateShape(member, shape, pull.segment, pull.distance, pair);
      form += pull.force * pair[0];
      scale += Math.abs(pull.force) * this.amplitude(shape, pull.segment, pair[0], pair[1]);
    }
    for (const term of this.slopes) {
      const wave = this.modeWave(shape, term.piece, true);
      form += pieceTimesWave(term.piece, wave);
      scale += reach(term, wave);
    }
    for (const term of this.given) {
      const s = member.foundation[term.piece.segment];
      if (s === 0) continue;
      const wave = this.modeWave(shape, term.piece, false);
      form += s * pieceTimesWave(term.piece, wave);
      scale += s * reach(term, wave);
    }
    for (let j = 0; j <= member.segmentCount; j++) {
      if (member.spring[j] === 0) continue;
      form += member.spring[j] * this.nodes[j] * nodeDisplacement(shape, j);
      scale += member.spring[j] * Math.abs(this.nodes[j]) * this.nodeAmplitude(shape, j);
    }
    return [form, scale];
  }

  private massProduct(shape: ModeShape): number {
    const { member } = this;
    let product = 0;
    for (const term of this.given) {
      const rho = member.inertia[term.piece.segment];
      if (rho > 0) product += rho * pieceTimesWave(term.piece, this.modeWave(shape, term.piece, false));
    }
    for (let j = 0; j <= member.segmentCount; j++) {
      product += member.mass[j] * this.nodes[j] * nodeDisplacement(shape, j);
    }
    return product;
  }

  /** φ (or p) of the mode on a piece's cell. */
  private modeWave(shape: ModeShape, piece: Piece, flux: boolean): WaveTerm {
    const { member, pair } = this;
    const k = member.stiffness[piece.segment];
    const square = waveNumberSquare(member, piece.segment, shape.lambda);
    evaluateShape(member, shape, piece.segment, piece.start, pair);
    const u = pair[0];
    const p = pair[1];
    evaluateShape(member, shape, piece.segment, piece.start + piece.length, pair);
    return flux
      ? { square, value: p, slope: -k * square * u, farValue: pair[1] }
      : { square, value: u, slope: p / k, farValue: pair[0] };
  }

  private amplitude(shape: ModeShape, segment: number, u: number, p: number): number {
    const square = waveNumberSquare(this.member, segment, shape.lambda);
    return square > 0 ? Math.hypot(u, p / (this.member.stiffness[segment] * Math.sqrt(square))) : Math.abs(u);
  }

  private nodeAmplitude(shape: ModeShape, j: number): number {
    const i = Math.max(0, j - 1);
    const at = ENDS * i + (j === 0 ? 0 : 2);
    return this.amplitude(shape, i, shape.ends[at], shape.ends[at + 1]);
  }
}

function termOf(piece: Piece): Term {
  let height = piece.powers.reduce((sum, c) => sum + Math.abs(c), 0);
  for (const term of piece.waves) height += waveAmplitude(term);
  return { piece, height };
}

function slopeOf(piece: Piece): Piece {
  return {
    ...piece,
    powers: derivedPowers(piece.powers).map((c) => c / piece.length),
    waves: piece.waves.map((term) => derivativeOf(term, piece.length)),
    magnitude: (piece.magnitude * Math.max(0, piece.powers.length - 1)) / piece.length,
  };
}

function waveAmplitude(wave: WaveTerm): number {
  return wave.square > 0
    ? Math.hypot(wave.value, wave.slope / Math.sqrt(wave.square))
    : Math.max(Math.abs(wave.value), Math.abs(wave.farValue));
}

/** About the largest that ∫ f y can be for waves of this amplitude and number. */
function reach(term: Term, wave: WaveTerm): number {
  const h = term.piece.length;
  const kappa = Math.sqrt(Math.abs(wave.square));
  let width = Math.min(h, (2 + 2 * term.piece.powers.length) / (kappa || 1 / h));
  for (const own of term.piece.waves) {
    const other = Math.sqrt(Math.abs(own.square));
    width = Math.max(width, Math.min(h, 2 / (Math.abs(kappa - other) || 1 / h)));
  }
  return term.height * waveAmplitude(wave) * width;
}
