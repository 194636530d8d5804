import type { WaveMember } from '../../members/wave-member.ts';
import { placeStations } from '../../modes/stations.ts';
import { stressFactors } from '../../modes/stress-factors.ts';
import { complex, modulus } from '../../numerics/complex.ts';
import type { TransferFunctionsRequest, TransferOutput } from '../../spec/types.ts';
import { NaturalFrequencies } from '../../spectrum/natural-frequencies.ts';
import { steadyFactors } from '../../steady/steady-member.ts';
import { SteadyResponse } from '../../steady/steady-response.ts';
import { HELD_NUMBERS, MODE_LIMIT } from '../limits.ts';
import { modesUnder } from '../transfer-series.ts';
import type { TransferModes } from '../transfer-modes.ts';
import { spreadWithin, type Spread, type Stretch } from './transfer-spread.ts';

/** Modes are solved up to so many times the highest frequency: what is left moves little below it. */
const BEYOND = 4;

/** Power of Ω in a quantity over that in the displacement. */
const POWER = { displacement: 0, velocity: 1, acceleration: 2, force: 0, stress: 0 } as const;

/** Bounds magnitudes of transfer functions between the frequencies at which they were solved. */
export class TransferBand {
  private readonly member: WaveMember;
  private readonly request: TransferFunctionsRequest;
  private readonly lossFactor: number;
  private readonly modes: TransferModes;

  /**
   * @param highest highest frequency of the band, Hz
   */
  constructor(member: WaveMember, request: TransferFunctionsRequest, highest: number) {
    const { damping } = request.member;
    this.member = member;
    this.request = request;
    this.lossFactor = damping?.type === 'loss-factor' ? damping.value : 0;
    const { outputs, input } = request;
    const end =
      input.type === 'point-force' || input.end !== 'far' ? 0 : member.position[member.segmentCount];
    const stations = placeStations(member, [...outputs.map(({ at }) => at), end]);
    const below = new NaturalFrequencies(member).countBelow(2 * Math.PI * BEYOND * highest);
    const held = Math.floor(HELD_NUMBERS / (4 * member.segmentCount + 2 * stations.segment.length));
    this.modes = modesUnder(member, input, stations, Math.max(1, Math.min(below + 8, held, MODE_LIMIT)));
  }

  /**
   * What a magnitude does not exceed anywhere within a stretch; infinite where a resonance may lie within.
   *
   * @param magnitude what it is at most in the middle of the stretch
   */
  upperWithin(output: number, stretch: Stretch, magnitude: number): number {
    const { input } = this.request;
    const wanted = this.request.outputs[output];
    const middle = 0.5 * (stretch.from + stretch.to);
    const flux = wanted.quantity === 'force' || wanted.quantity === 'stress';
    const scale = this.scaleOf(wanted);
    const power = powerOf(this.request, wanted);
    let own = magnitude / (scale * middle ** power);
    let base = 1;
    if (input.type === 'outcrop-motion') {
      const stiffness = this.baseStiffness(input.end, middle);
      const rock = middle * input.impedance;
      const joined = Math.hypot(stiffness.re, stiffness.im + rock);
      own *= joined / rock;
      const soft = this.spread(this.request.outputs.length, stretch, {
        displacement: 1,
        flux: modulus(stiffness),
      }).flux;
      const nearest = joined - soft - 0.5 * (stretch.to - stretch.from) * input.impedance;
      // the member takes power from its base, so Im K ≥ 0 and the base moves no more than the outcrop
      if (nearest > 0) base = Math.min(1, (stretch.to * input.impedance) / nearest);
    }
    const spread = this.spread(output, stretch, { displacement: own, flux: own });
    const reach = own + (flux ? spread.flux : spread.displacement);
    const edge = power >= 0 ? stretch.to : stretch.from;
    return base * reach * scale * edge ** power;
  }

  private spread(output: number, stretch: Stretch, middle: Spread): Spread {
    const motion = this.request.input.type !== 'point-force';
    return spreadWithin(this.member, this.modes, motion, output, this.lossFactor, stretch, middle);
  }

  private baseStiffness(end: 'near' | 'far', omega: number): { readonly re: number; readonly im: number } {
    if (omega === 0) return complex(0);
    return new SteadyResponse(this.member, steadyFactors(this.member, omega, this.lossFactor)).endStiffness(
      end,
    );
  }

  private scaleOf({ at, quantity }: TransferOutput): number {
    return quantity === 'stress' ? stressFactors(this.member, placeStations(this.member, [at]))[0] : 1;
  }
}

/** Power of Ω that turns displacement or flux per unit force or end displacement into output per input. */
function powerOf({ input }: TransferFunctionsRequest, { quantity }: TransferOutput): number {
  return POWER[quantity] - (input.type !== 'point-force' && input.quantity === 'acceleration' ? 2 : 0);
}
