import type { Numbers } from '../../spec/types.ts';
import type { AxisSpec } from '../frame/axis.ts';
import type { MemberOutline } from './member-outline.ts';

/** The words of a figure. */
export interface FigureWords {
  /** What is shown. */
  readonly title: string;
  /** Member, verdict and number of modes. */
  readonly subtitle: string;
  /** What the reader must know: bounds, selections. */
  readonly notes: readonly string[];
}

/** A curve over the common axis of its panel. */
export interface Curve {
  /** Ascending, shape [points]. */
  readonly along: Numbers;
  /** Shape [points]. */
  readonly values: Numbers;
  /** Half width of the band around it in which the truth lies, shape [points]. */
  readonly bound?: Numbers;
  /** Number of the line colour and dash pattern; −1 is drawn soft. */
  readonly look: number;
  /** How it is drawn; lines where absent. */
  readonly kind?: 'line' | 'steps' | 'stems' | 'dots';
  /** Letter at its end that the key explains. */
  readonly tag?: string;
  /** What stands above each stem where it fits, the tallest first. */
  readonly labels?: readonly string[];
}

/** A filled area between two curves over the same places. */
export interface Area {
  readonly along: Numbers;
  readonly lower: Numbers;
  readonly upper: Numbers;
  /** body: the area itself; bound: the strip in which the truth may lie beyond it. */
  readonly role: 'body' | 'bound';
}

/** A single point that is named. */
export interface Mark {
  readonly along: number;
  readonly value: number;
}

/** One plot among those that share their axis along. */
export interface Panel {
  readonly label: string;
  /** Axis of the values; that of the figure where absent. */
  readonly value?: AxisSpec;
  readonly areas?: readonly Area[];
  readonly curves: readonly Curve[];
  readonly marks?: readonly Mark[];
}

/** An entry of the key: what a line pattern stands for. */
export interface KeyEntry {
  readonly label: string;
  readonly look: number;
  readonly kind?: 'line' | 'area' | 'bound' | 'stem' | 'dot';
}

/** A figure of one or more plots over a common axis: everything but where it lies on the paper. */
export interface PanelFigure {
  readonly words: FigureWords;
  /** The common axis: time, position, frequency, order of the mode. */
  readonly along: AxisSpec;
  /** Axis of the values of all panels that have none of their own. */
  readonly value?: AxisSpec;
  readonly panels: readonly Panel[];
  readonly key: readonly KeyEntry[];
  /** The member along the common axis, where that is position. */
  readonly outline?: MemberOutline;
}
