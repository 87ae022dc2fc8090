/** A rectangle on paper, y downwards. */
export interface Rectangle {
  readonly left: number;
  readonly right: number;
  readonly top: number;
  readonly bottom: number;
}

/** Distance between the lines along the horizontal. */
const pitch = 9;

/**
 * Lines at 45° that fill a rectangle, as one path.
 *
 * Drawn, not a pattern fill: a pattern needs a reference by id, and some printers turn it into a bitmap.
 */
export function hatching({ left, right, top, bottom }: Rectangle): string {
  const depth = bottom - top;
  if (depth <= 0) return '';
  const count = Math.floor((right - left + depth) / pitch);
  return Array.from({ length: count }, (_, index) => left + (index + 1) * pitch)
    .map((head) => {
      // The line x + y = const through (head, top), cut at the rectangle's sides.
      const from = Math.min(head, right);
      const to = Math.max(head - depth, left);
      return `M${tenth(from)} ${tenth(top + head - from)}L${tenth(to)} ${tenth(top + head - to)}`;
    })
    .join('');
}

function tenth(value: number): string {
  return String(Math.round(value * 10) / 10);
}
