import { colours, lineGrey } from "./colours.js";
import { timeLine } from "./gaps.js";

const size = { width: 180, height: 28 };

/** A small line of a column over time, as SVG: no axes; missing periods break it, filled ones are marked below it. */
export function spark(
  ordinals: ArrayLike<number>,
  values: ArrayLike<number>,
  filled?: ArrayLike<number>,
): string {
  const { width, height } = size;
  const few = timeLine(ordinals, values, width / 2);
  const from = few.x[0] ?? 0;
  const span = (few.x[few.x.length - 1] ?? 1) - from || 1;
  let [low, high] = [Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY];
  for (const value of few.y) {
    if (!Number.isFinite(value)) continue;
    low = Math.min(low, value);
    high = Math.max(high, value);
  }
  const px = (value: number) => (2 + ((value - from) / span) * (width - 4)).toFixed(1);
  const py = (value: number) => {
    // Halved first: the range of two large numbers of unlike sign may overflow.
    const share = high > low ? (value / 2 - low / 2) / (high / 2 - low / 2) : 0.5;
    return (height - 5 - share * (height - 9)).toFixed(1);
  };
  let path = "";
  const alone: string[] = [];
  let run = 0;
  for (let i = 0; i <= few.x.length; i++) {
    const value = i < few.x.length ? few.y[i]! : Number.NaN;
    if (!Number.isFinite(value)) {
      if (run === 1) alone.push(`<circle cx="${px(few.x[i - 1]!)}" cy="${py(few.y[i - 1]!)}" r="1.2"/>`);
      run = 0;
      continue;
    }
    path += `${run === 0 ? "M" : "L"}${px(few.x[i]!)} ${py(value)}`;
    run++;
  }
  const marks = new Set<string>();
  if (filled) for (let i = 0; i < filled.length; i++) if (filled[i]) marks.add(px(ordinals[i]!));
  return [
    `<svg xmlns="http://www.w3.org/2000/svg" width="${width}" height="${height}" viewBox="0 0 ${width} ${height}">`,
    `<path d="M0 ${height - 0.5}H${width}" stroke="${lineGrey}" stroke-opacity="0.4"/>`,
    `<path d="${path}" fill="none" stroke="${colours.blue}" stroke-width="1.2" stroke-linejoin="round"/>`,
    alone.length > 0 ? `<g fill="${colours.blue}">${alone.join("")}</g>` : "",
    marks.size === 0
      ? ""
      : `<path d="${[...marks].map((at) => `M${at} ${height - 3}v3`).join("")}" stroke="${colours.vermillion}" stroke-width="1.5"/>`,
    "</svg>",
  ].join("");
}
