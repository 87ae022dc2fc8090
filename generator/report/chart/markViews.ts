import { type Area, place } from './area.ts';
import type { DataPoint, Mark } from './Chart.ts';
import { paper, type ShapeView, type TextView, textView } from './ChartView.ts';
import { hatching } from './hatching.ts';

/** Height that a line of text needs inside a zone. */
const lineHeight = 15;

export function markShapes(mark: Mark, area: Area): ShapeView[] {
  switch (mark.kind) {
    case 'band':
      return [
        {
          d: `${path([...mark.upper, ...[...mark.lower].reverse()], area)}Z`,
          className: `band ${mark.ink}`,
        },
      ];
    case 'line':
      return [{ d: path(mark.points, area), className: `line ${mark.ink}` }];
    case 'level':
      return [{ d: level(mark.y, area), className: `line ${mark.ink}` }];
    case 'forbidden':
      return [
        {
          d: hatching({ left: area.left, right: area.right, top: area.up(mark.below), bottom: area.bottom }),
          className: 'hatch',
        },
        { d: level(mark.below, area), className: 'line edge' },
      ];
    case 'rings':
      return symbols(mark.points, area, ring, `ring ${mark.ink}`);
    case 'crosses':
      return symbols(mark.points, area, cross, `cross ${mark.ink}`);
    case 'outside':
      return [
        {
          d: hatching({ left: area.left, right: area.right, top: area.top, bottom: area.bottom }),
          className: 'hatch',
        },
      ];
    case 'tint':
      return [{ d: `${path(mark.outline, area)}Z`, className: `tint t${mark.step}` }];
    case 'contour':
      return [{ d: path(mark.points, area), className: 'contour' }];
    case 'note':
      return [];
  }
}

export function markTexts(mark: Mark, area: Area): TextView[] {
  if (mark.kind === 'forbidden') {
    const y = area.up(mark.below);
    if (area.bottom - y < lineHeight) return [];
    return [textView(area.left + 8, (y + area.bottom) / 2 + 4, mark.label, 'start', 'halo')];
  }
  if (mark.kind === 'contour') return contourText(mark, area);
  if (mark.kind === 'outside') {
    if (mark.at === null) return [];
    const [x, y] = place(area, mark.at);
    return [textView(x, y + 4, mark.label, 'middle', 'halo')];
  }
  if (mark.kind !== 'note') return [];
  const [x, y] = place(area, mark.at);
  const share = (x - area.left) / (area.right - area.left);
  const anchor = share < 0.3 ? 'start' : share > 0.7 ? 'end' : 'middle';
  return [textView(x, y + (mark.side === 'above' ? -10 : 19), mark.text, anchor, `halo ${mark.ink}`)];
}

/** On the line itself, where there is room for it beside the plot's edges. */
function contourText({ points, label }: Extract<Mark, { kind: 'contour' }>, area: Area): TextView[] {
  const room = 18;
  const inside = points
    .map((point) => place(area, point))
    .filter(
      ([x, y]) => x > area.left + room && x < area.right - room && y > area.top + 12 && y < area.bottom - 8,
    );
  const at = inside[Math.floor(0.62 * inside.length)];
  return at === undefined ? [] : [textView(at[0], at[1] + 4, label, 'middle', 'halo')];
}

function path(points: readonly DataPoint[], area: Area): string {
  return points
    .map((point, index) => `${index === 0 ? 'M' : 'L'}${place(area, point).map(paper).join(' ')}`)
    .join('');
}

function level(y: number, area: Area): string {
  return `M${area.left} ${paper(area.up(y))}H${paper(area.right)}`;
}

function symbols(
  points: readonly DataPoint[],
  area: Area,
  symbol: (at: DataPoint) => string,
  className: string,
): ShapeView[] {
  if (points.length === 0) return [];
  return [{ d: points.map((point) => symbol(place(area, point))).join(''), className }];
}

export function ring([x, y]: DataPoint): string {
  return `M${paper(x - 4)} ${paper(y)}a4 4 0 1 0 8 0a4 4 0 1 0 -8 0Z`;
}

/** Its arms reach out of a ring at the same place. */
export function cross([x, y]: DataPoint): string {
  return `M${paper(x - 8)} ${paper(y)}h16M${paper(x)} ${paper(y - 8)}v16`;
}
