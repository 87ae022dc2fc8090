/** A path with its classes; colour and line style are the style sheet's. */
export interface ShapeView {
  readonly d: string;
  readonly className: string;
}

export interface TextView {
  readonly x: string;
  readonly y: string;
  readonly text: string;
  readonly anchor: Anchor;
  readonly className: string;
}

export type Anchor = 'start' | 'middle' | 'end';

/** A plot ready to be laid out: paths below, texts above. */
export interface ChartView {
  readonly id: string;
  readonly title: string;
  readonly description: string;
  readonly format: string;
  readonly viewBox: string;
  readonly width: string;
  readonly height: string;
  readonly shapes: readonly ShapeView[];
  readonly texts: readonly TextView[];
}

export function textView(x: number, y: number, text: string, anchor: Anchor, className: string): TextView {
  return { x: paper(x), y: paper(y), text, anchor, className };
}

/** A length on paper: a tenth of a pixel is finer than any eye or printer. */
export function paper(value: number): string {
  const rounded = Math.round(value * 10) / 10;
  return String(rounded === 0 ? 0 : rounded);
}
