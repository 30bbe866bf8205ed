import { colours, lineGrey } from "../chart/colours.js";
import { number } from "../text/figures.js";
import { type Html, html, trusted } from "../text/html.js";
import type { Axis } from "./axis.js";

/** An interval about an estimate. */
export interface Interval {
  readonly estimate: number;
  readonly low: number;
  readonly high: number;
}

/** How an interval is drawn. */
export interface IntervalLook {
  readonly colour?: string;
  /** Height of the box, as CSS. Default 1.85em, which lets the zero marks of neighbouring rows meet. */
  readonly height?: string;
  readonly line?: "solid" | "dashed" | "dotted";
}

// Everything is drawn with borders: browsers print borders, but leave backgrounds out.
const at = (percent: number) => `left:${percent.toFixed(2)}%`;
const clip = (percent: number) => Math.min(100, Math.max(0, percent));

/** An arrow at one end of the box: there is more beyond it. */
function arrow(side: "left" | "right", colour: string): string {
  const back = side === "left" ? "right" : "left";
  return `<span style="position:absolute;${side}:0;top:50%;margin-top:-5px;width:0;height:0;border-top:5px solid transparent;border-bottom:5px solid transparent;border-${back}:7px solid ${colour}"></span>`;
}

/** The mark of zero (dashed) on an axis, if zero is on it. */
function zeroMark(axis: Axis): Html {
  const zero = axis.position(0);
  if (zero < 0 || zero > 100) return trusted("");
  return trusted(
    `<span style="position:absolute;${at(zero)};top:0;height:100%;border-left:1px dashed ${lineGrey}"></span>`,
  );
}

/**
 * An interval drawn on an axis with zero marked. An interval without zero has a filled point and a thick line, one with
 * zero a ring and a thin line. What lies beyond the axis ends in an arrow.
 */
export function drawInterval(axis: Axis, interval: Interval, look: IntervalLook = {}): Html {
  const { estimate, low, high } = interval;
  const box = (inner: Html) =>
    html`<div style="position:relative;height:${look.height ?? "1.85em"};min-width:8em">${zeroMark(axis)}${inner}</div>`;
  if (Number.isNaN(low) || Number.isNaN(high)) return box(trusted(""));
  const colour = look.colour ?? colours.blue;
  const sure = low > 0 || high < 0;
  const [left, right] = [axis.position(low), axis.position(high)];
  const [from, to] = [clip(left), clip(right)];
  const thick = sure ? 3 : 2;
  const pieces: string[] = [];
  if (to > from) {
    pieces.push(
      `<span style="position:absolute;${at(from)};width:${(to - from).toFixed(2)}%;top:50%;margin-top:-${thick / 2}px;border-top:${thick}px ${look.line ?? "solid"} ${colour}"></span>`,
    );
  }
  if (left < 0) pieces.push(arrow("left", colour));
  if (right > 100) pieces.push(arrow("right", colour));
  const point = axis.position(estimate);
  if (point >= 0 && point <= 100) {
    pieces.push(
      sure
        ? `<span style="position:absolute;${at(point)};top:50%;margin-left:-5px;margin-top:-5px;width:0;height:0;border:5px solid ${colour};border-radius:50%"></span>`
        : `<span style="position:absolute;${at(point)};top:50%;margin-left:-5px;margin-top:-5px;width:6px;height:6px;border:2px solid ${colour};border-radius:50%;box-sizing:content-box"></span>`,
    );
  }
  return box(trusted(pieces.join("")));
}

/** Several intervals about one estimate, as the widest stretch they take and the one they have in common. */
export interface Span {
  readonly estimate: number;
  readonly outer: readonly [number, number];
  readonly inner: readonly [number, number];
  /** Whether the point is filled, half filled or a ring. */
  readonly filled: "full" | "half" | "none";
}

/** Draws several intervals as one: a thin line over the widest stretch, a thick one over what all have in common. */
export function drawSpan(axis: Axis, span: Span): Html {
  const colour = colours.blue;
  const line = ([low, high]: readonly [number, number], thick: number) => {
    const [from, to] = [clip(axis.position(low)), clip(axis.position(high))];
    return to > from
      ? `<span style="position:absolute;${at(from)};width:${(to - from).toFixed(2)}%;top:50%;margin-top:-${thick / 2}px;border-top:${thick}px solid ${colour}"></span>`
      : "";
  };
  const point = axis.position(span.estimate);
  const beyond =
    (axis.position(span.outer[0]) < 0 ? arrow("left", colour) : "") +
    (axis.position(span.outer[1]) > 100 ? arrow("right", colour) : "");
  const place = `position:absolute;${at(point)};top:50%;margin-left:-5px;margin-top:-5px`;
  const mark = {
    full: `<span style="${place};width:0;height:0;border:5px solid ${colour};border-radius:50%"></span>`,
    half: `<span style="${place};border:2px solid ${colour};border-left:5px solid ${colour};box-sizing:border-box;width:10px;height:10px;border-radius:50%"></span>`,
    none: `<span style="${place};width:6px;height:6px;border:2px solid ${colour};border-radius:50%;box-sizing:content-box"></span>`,
  }[span.filled];
  return html`<div style="position:relative;height:1.85em;min-width:8em">${zeroMark(axis)}${trusted(line(span.outer, 1.5) + line(span.inner, 4) + beyond + (point >= 0 && point <= 100 ? mark : ""))}</div>`;
}

/** The figures on an axis, for the heading of the column that intervals are drawn in. */
export function axisHead(axis: Axis, title: string): Html {
  const label = (x: number) =>
    `<span style="position:absolute;${at(axis.position(x))};width:6em;margin-left:-3em;text-align:center;white-space:nowrap">${number(x, 3)}</span>`;
  // From zero outwards, a tick is named where its name has room: the column may be as narrow as ten letters.
  const ticks = [...axis.ticks].sort((a, b) => Math.abs(a) - Math.abs(b));
  const named: number[] = [];
  for (const tick of ticks) {
    const room = Math.max(18, 8 * number(tick, 3).length);
    if (named.every((other) => Math.abs(axis.position(other) - axis.position(tick)) >= room))
      named.push(tick);
  }
  // Where zero is not on the axis, its side is said.
  const zero = axis.position(0);
  const aside =
    zero < 0 || zero > 100
      ? `<span style="position:absolute;${zero < 0 ? "left" : "right"}:0">${zero < 0 ? "← 0" : "0 →"}</span>`
      : "";
  return html`<div style="font-weight:bold;white-space:normal">${title}</div><div style="position:relative;height:1.3em;min-width:8em;font-weight:normal;opacity:0.8">${trusted(aside + named.map(label).join(""))}</div>`;
}
