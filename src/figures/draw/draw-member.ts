import type { Lump, MemberOutline } from '../data/member-outline.ts';
import { px, type Sheet } from '../frame/sheet.ts';
import { sizes } from '../frame/theme.ts';
import { textWidth } from '../text/font.ts';
import { shorten } from '../text/fit-text.ts';

/** Where the member lies on the sheet. */
export interface MemberPlace {
  /** Place of a position, px along the member. */
  readonly place: (position: number) => number;
  /** Its centre line, px across it. */
  readonly line: number;
  readonly upright: boolean;
}

/** Room that the drawing takes on each side of the centre line, px: springs and dashpots reach to the ground. */
export function memberDepth(outline: MemberOutline): { before: number; behind: number } {
  const grounded = [outline.near, outline.far, ...outline.attachments].some(
    (lump) => lump !== 'fixed' && (lump.spring || lump.dashpot),
  );
  return { before: 9, behind: grounded ? 21 : 9 };
}

/**
 * Draws the member the way it is drawn in engineering: hatched walls where ends are fixed, masses as dots,
 * springs and dashpots to a hatched ground, ticks where segments meet.
 */
export function drawMember(sheet: Sheet, outline: MemberOutline, where: MemberPlace): void {
  const { ink, softInk } = sheet.palette;
  const pen = new Pen(where);
  const start = where.place(0);
  const end = where.place(outline.length);
  const forward = end > start ? 1 : -1;
  let ticks = '';
  let last = -Infinity;
  for (const at of outline.boundaries) {
    const u = where.place(at);
    if (Math.abs(u - last) < 3) continue;
    ticks += pen.move(u, -4) + pen.draw(u, 4);
    last = u;
  }
  sheet.path(ticks, { color: softInk });
  sheet.path(pen.move(start, 0) + pen.draw(end, 0), { color: ink, width: 2.5 });
  let thin = '';
  for (const [at, support, outward] of [
    [start, outline.near, -forward],
    [end, outline.far, forward],
  ] as const) {
    if (support === 'fixed') thin += wall(pen, at, outward);
    else thin += grounded(pen, at, support);
  }
  const dots: number[] = [];
  if (outline.near !== 'fixed' && outline.near.mass) dots.push(start);
  if (outline.far !== 'fixed' && outline.far.mass) dots.push(end);
  let lastGround = -Infinity;
  for (const attachment of outline.attachments) {
    const u = where.place(attachment.at);
    if (attachment.mass) dots.push(u);
    // grounds closer than they are wide would run into each other
    if ((attachment.spring || attachment.dashpot) && Math.abs(u - lastGround) >= 14) {
      thin += grounded(pen, u, attachment);
      lastGround = u;
    }
  }
  sheet.path(thin, { color: ink, width: 1.1 });
  for (const [i, u] of dots.toSorted((a, b) => a - b).entries()) {
    if (i > 0 && Math.abs(u - dots[i - 1]) < 2 && dots.length > 200) continue;
    const [x, y] = pen.at(u, 0);
    sheet.circle(x, y, 4, ink);
  }
}

/** Turns places along (u) and beside (v) the member into places on the sheet. */
class Pen {
  readonly where: MemberPlace;

  constructor(where: MemberPlace) {
    this.where = where;
  }

  at(u: number, v: number): [x: number, y: number] {
    return this.where.upright ? [this.where.line - v, u] : [u, this.where.line + v];
  }

  move(u: number, v: number): string {
    const [x, y] = this.at(u, v);
    return `M${px(x)} ${px(y)}`;
  }

  draw(u: number, v: number): string {
    const [x, y] = this.at(u, v);
    return `L${px(x)} ${px(y)}`;
  }
}

function wall(pen: Pen, u: number, outward: number): string {
  let path = pen.move(u, -8) + pen.draw(u, 8);
  for (let v = -8; v <= 4; v += 4) path += pen.move(u, v + 4) + pen.draw(u + 5 * outward, v);
  return path;
}

function grounded(pen: Pen, u: number, lump: Lump): string {
  if (!lump.spring && !lump.dashpot) return '';
  const apart = lump.spring && lump.dashpot ? 5 : 0;
  let path = '';
  if (lump.spring) {
    const at = u - apart;
    path += pen.move(at, 0) + pen.draw(at, 4);
    for (let i = 0; i < 4; i++) path += pen.draw(at + (i % 2 === 0 ? 3 : -3), 5.25 + 2.25 * i);
    path += pen.draw(at, 13) + pen.draw(at, 15);
  }
  if (lump.dashpot) {
    const at = u + apart;
    path += pen.move(at, 0) + pen.draw(at, 8) + pen.move(at - 2.5, 8) + pen.draw(at + 2.5, 8);
    path += pen.move(at - 4, 6) + pen.draw(at - 4, 11) + pen.draw(at + 4, 11) + pen.draw(at + 4, 6);
    path += pen.move(at, 11) + pen.draw(at, 15);
  }
  const half = 5 + apart;
  path += pen.move(u - half, 15) + pen.draw(u + half, 15);
  for (let h = -half; h < half - 1; h += 4) path += pen.move(u + h + 4, 15) + pen.draw(u + h, 19);
  return path;
}

/**
 * Names beside the member that fit without touching: attachments first, then segments whose stretch holds
 * their name. Across, they stand in one row; upright, they end at the given place and are shortened to the
 * width.
 */
export function drawNames(
  sheet: Sheet,
  outline: MemberOutline,
  where: MemberPlace,
  at: number,
  room: { least: number; most: number; width: number },
): void {
  const taken: [number, number][] = [];
  for (const { from, to, name } of outline.names) {
    const a = where.place(from);
    const b = where.place(to);
    const stretch = Math.abs(b - a);
    const text = where.upright ? shorten(name, sizes.tick, room.width) : shorten(name, sizes.tick, 180);
    const half = where.upright ? sizes.tick * 0.6 : textWidth(text, sizes.tick) / 2 + 4;
    if (from !== to && stretch < 2 * half) continue;
    const middle = Math.min(Math.max((a + b) / 2, room.least + half), room.most - half);
    const span: [number, number] = [middle - half, middle + half];
    if (taken.some(([low, high]) => span[0] < high && span[1] > low)) continue;
    taken.push(span);
    const color = sheet.palette.softInk;
    if (where.upright) sheet.text(at, middle + sizes.tick * 0.36, text, sizes.tick, { anchor: 'end', color });
    else sheet.text(middle, at, text, sizes.tick, { anchor: 'middle', color });
  }
}
