/** A sheet for a plot, in units that are pixels at full size. */
export interface Format {
  readonly name: 'wide' | 'half' | 'narrow';
  readonly width: number;
  readonly height: number;
  /** Room for the labels at the right edge. */
  readonly margin: number;
}

/** Across the sheet, half of it, and a telephone's width. */
export const formats = {
  wide: { name: 'wide', width: 1000, height: 330, margin: 126 },
  half: { name: 'half', width: 540, height: 320, margin: 104 },
  narrow: { name: 'narrow', width: 332, height: 290, margin: 92 },
} as const satisfies Record<Format['name'], Format>;
