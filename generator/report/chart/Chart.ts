/** Abscissa and ordinate in the axes' SI units. */
export type DataPoint = readonly [x: number, y: number];

export interface Axis {
  readonly quantity: string;
  /** SI unit; the prefix follows from the range. Empty for plain numbers. */
  readonly unit: string;
  readonly low: number;
  readonly high: number;
  /** Ratios, where the largest is several times the least. */
  readonly isLogarithmic?: boolean;
  /** Distance between the figures along the axis where it is not the usual one, two or five. */
  readonly step?: number;
}

/** Colour and line style; each is the same through the whole report. */
export type Ink =
  | 'adaptive'
  | 'fixed'
  | 'vout'
  | 'constant-q'
  | 'predicted'
  | 'simulated'
  | 'goal'
  | 'ceiling'
  | 'edge'
  | 'plain';

/** What is drawn, the first at the bottom. */
export type Mark =
  /** Between two curves. */
  | {
      readonly kind: 'band';
      readonly ink: Ink;
      readonly upper: readonly DataPoint[];
      readonly lower: readonly DataPoint[];
    }
  | { readonly kind: 'line'; readonly ink: Ink; readonly points: readonly DataPoint[] }
  /** Across the whole width. */
  | { readonly kind: 'level'; readonly ink: Ink; readonly y: number }
  /** Hatched, from the foot of the plot up to a value. */
  | { readonly kind: 'forbidden'; readonly below: number; readonly label: string }
  /** Open circles: simulated. */
  | { readonly kind: 'rings'; readonly ink: Ink; readonly points: readonly DataPoint[] }
  /** Crosses: predicted. */
  | { readonly kind: 'crosses'; readonly ink: Ink; readonly points: readonly DataPoint[] }
  /** The whole plot hatched, to be covered where there is something. */
  | { readonly kind: 'outside'; readonly label: string; readonly at: DataPoint | null }
  /** Filled with a step of the scale from paper to ink. */
  | { readonly kind: 'tint'; readonly step: number; readonly outline: readonly DataPoint[] }
  /** Line of one value, labelled on itself. */
  | { readonly kind: 'contour'; readonly label: string; readonly points: readonly DataPoint[] }
  | {
      readonly kind: 'note';
      readonly at: DataPoint;
      readonly text: string;
      readonly side: 'above' | 'below';
      readonly ink: Ink;
    };

/** A label beside the right edge of the plot, at the height of what it names. */
export interface EdgeLabel {
  readonly y: number;
  readonly text: string;
  readonly ink: Ink;
}

/** How a kind of mark looks, and what it stands for. */
export interface LegendEntry {
  readonly mark: 'line' | 'rings' | 'crosses' | 'tint';
  readonly ink: Ink;
  /** Of the scale from paper to ink, for a tint. */
  readonly step?: number;
  readonly text: string;
}

/** One plot, one idea. */
export interface Chart {
  /** Unique in the page, for the references of title and description. */
  readonly id: string;
  readonly title: string;
  /** What is to be seen, for those who do not see it. */
  readonly description: string;
  readonly x: Axis;
  readonly y: Axis;
  readonly marks: readonly Mark[];
  readonly edgeLabels: readonly EdgeLabel[];
  readonly legend: readonly LegendEntry[];
}
