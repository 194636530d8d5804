import type { Curve, Panel } from '../data/panel-figure.ts';
import type { Axis } from '../frame/axis.ts';
import { type Box, px, type Sheet } from '../frame/sheet.ts';
import { sizes } from '../frame/theme.ts';
import { textWidth } from '../text/font.ts';
import { lineColor, lineDash } from './draw-words.ts';
import { areaBetween, pathOf, placesOf, type Points, stepsOf, thinOut } from './trace.ts';

/** Axes of a panel; `upright`: the common axis grows upwards and values run across. */
export interface PanelAxes {
  readonly along: Axis;
  readonly value: Axis;
  readonly upright: boolean;
  /** Places that are marked by a light line across the panel, px along. */
  readonly divisions: readonly number[];
}

/** Draws grid, areas, curves and marks of one panel into its box. */
export function drawPanel(sheet: Sheet, box: Box, panel: Panel, axes: PanelAxes): void {
  const { grid, edge, ink } = sheet.palette;
  const { along, value, upright } = axes;
  const alongGrid = along.ticks.map((tick) => crossing(box, tick.at, upright)).join('');
  const valueGrid = value.ticks.map((tick) => crossing(box, tick.at, !upright)).join('');
  sheet.path(alongGrid + valueGrid, { color: grid });
  sheet.path(axes.divisions.map((at) => crossing(box, at, upright)).join(''), {
    color: edge,
    dash: '1 3',
    opacity: 0.8,
  });
  const zero = value.place(0);
  if (inside(zero, box, !upright)) sheet.path(crossing(box, zero, !upright), { color: edge });
  for (const area of panel.areas ?? []) {
    const places = placesOf(area.along, along.place);
    const lower = { along: places, across: placesOf(area.lower, value.place) };
    const upper = { along: places, across: placesOf(area.upper, value.place) };
    const strong = area.role === 'bound';
    sheet.area(areaBetween(lower, upper, upright), lineColor(sheet, strong ? 1 : 0), strong ? 0.4 : 0.18);
  }
  for (const curve of panel.curves) drawBand(sheet, box, curve, axes);
  for (const curve of panel.curves) drawCurve(sheet, curve, axes);
  for (const mark of panel.marks ?? []) {
    const a = along.place(mark.along);
    const b = value.place(mark.value);
    const [x, y] = upright ? [b, a] : [a, b];
    sheet.circle(x, y, 5, sheet.palette.paper);
    sheet.circle(x, y, 3.5, ink);
  }
  sheet.path(`M${px(box.x)} ${px(box.y)}h${px(box.width)}v${px(box.height)}h${px(-box.width)}Z`, {
    color: edge,
  });
  for (const curve of panel.curves) labelStems(sheet, box, curve, axes);
  if (!upright) drawTags(sheet, box, panel.curves, axes);
}

function inside(at: number, box: Box, isAcross: boolean): boolean {
  return isAcross ? at > box.y && at < box.y + box.height : at > box.x && at < box.x + box.width;
}

/** A line over the whole box at one place: level where `level` is true, upright where it is not. */
function crossing(box: Box, at: number, level: boolean): string {
  return level
    ? `M${px(box.x)} ${px(at)}H${px(box.x + box.width)}`
    : `M${px(at)} ${px(box.y)}V${px(box.y + box.height)}`;
}

function drawBand(
  sheet: Sheet,
  box: Box,
  { along, values, bound, look }: Curve,
  { along: common, value, upright }: PanelAxes,
): void {
  if (bound === undefined) return;
  const places = placesOf(along, common.place);
  const [least, most] = upright ? [box.x, box.x + box.width] : [box.y, box.y + box.height];
  const edgeAt = (at: number) => Math.min(Math.max(value.place(at), least), most);
  const lower = Float64Array.from(bound, (half, i) => edgeAt(values[i] - half));
  const upper = Float64Array.from(bound, (half, i) => edgeAt(values[i] + half));
  // a band that the line hides is not drawn; the words tell it
  if (upper.every((at, i) => Math.abs(at - lower[i]) < 1.6)) return;
  const path = areaBetween({ along: places, across: lower }, { along: places, across: upper }, upright);
  sheet.area(path, lineColor(sheet, look), 0.28);
}

function drawCurve(sheet: Sheet, curve: Curve, axes: PanelAxes): void {
  const color = lineColor(sheet, curve.look);
  const points = {
    along: placesOf(curve.along, axes.along.place),
    across: placesOf(curve.values, axes.value.place),
  };
  if (curve.kind === 'stems') return drawStems(sheet, points, color, axes);
  if (curve.kind === 'steps')
    return sheet.path(stepsOf(thinOut(points)), { color, width: 1.2, dash: lineDash(curve.look) });
  const thin = thinOut(points);
  const count = curve.along.length;
  if (count > 1) {
    const stroke = { color, width: curve.look < 0 ? 1 : 1.5, dash: lineDash(curve.look) } as const;
    sheet.path(pathOf(thin, axes.upright), { ...stroke, join: 'round' });
  }
  // few samples are shown as such: between them the curve is only guessed
  const reach = Math.abs(points.along[count - 1] - points.along[0]);
  if (curve.kind === 'dots' && (count === 1 || reach / count > 7)) {
    for (let i = 0; i < count; i++) {
      const [x, y] = axes.upright ? [points.across[i], points.along[i]] : [points.along[i], points.across[i]];
      sheet.circle(x, y, 2.4, color);
    }
  }
}

/** One stem a pixel column at most: the tallest. */
function drawStems(sheet: Sheet, { along, across }: Points, color: string, axes: PanelAxes): void {
  const foot = axes.value.place(0);
  const tallest = new Map<number, number>();
  for (let i = 0; i < along.length; i++) {
    const column = Math.round(along[i]);
    const before = tallest.get(column);
    if (before === undefined || across[i] < across[before]) tallest.set(column, i);
  }
  const kept = [...tallest.values()];
  const path = kept.map((i) => `M${px(along[i])} ${px(foot)}V${px(across[i])}`).join('');
  sheet.path(path, { color, width: kept.length > 150 ? 1 : 1.8 });
  if (kept.length <= 150) for (const i of kept) sheet.circle(along[i], across[i], 3, color);
}

/** Words above stems, the tallest first, where they touch no other. */
function labelStems(sheet: Sheet, box: Box, curve: Curve, axes: PanelAxes): void {
  const { labels = [], along, values } = curve;
  const taken: { x: number; half: number; y: number }[] = [];
  const order = Array.from(labels, (_, i) => i).toSorted((a, b) => values[b] - values[a] || a - b);
  for (const i of order) {
    if (labels[i] === '') continue;
    const half = textWidth(labels[i], sizes.tick) / 2 + 2;
    const x = Math.min(Math.max(axes.along.place(along[i]), box.x + half), box.x + box.width - half);
    const y = axes.value.place(values[i]) - 6;
    const touches = taken.some(
      (other) => Math.abs(other.x - x) < other.half + half && Math.abs(other.y - y) < 14,
    );
    if (touches || y < box.y + sizes.tick) continue;
    taken.push({ x, half, y });
    sheet.text(x, y, labels[i], sizes.tick, { anchor: 'middle', halo: true });
  }
}

/** Letters at the ends of curves, moved apart where they would touch. */
function drawTags(sheet: Sheet, box: Box, curves: readonly Curve[], axes: PanelAxes): void {
  const tags = curves
    .filter((curve) => curve.tag !== undefined)
    .map(({ tag = '', values }) => ({ tag, y: axes.value.place(values[values.length - 1]) }))
    .toSorted((a, b) => a.y - b.y);
  const apart = Math.min(sizes.tick + 1, box.height / Math.max(tags.length, 1));
  let least = box.y + 4;
  for (const tag of tags) {
    tag.y = Math.max(tag.y, least);
    least = tag.y + apart;
  }
  let most = box.y + box.height - 2;
  for (const tag of tags.toReversed()) {
    tag.y = Math.min(tag.y, most);
    most = tag.y - apart;
  }
  for (const { tag, y } of tags) {
    sheet.text(box.x + box.width + 4, y + 4, tag, sizes.tick);
  }
}
