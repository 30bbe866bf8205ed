/** Offset in UTF-16 units (JavaScript's) of an offset in Unicode code points (the protocol's). */
export function toUnits(text: string, points: number): number {
  let units = 0;
  for (let i = 0; i < points && units < text.length; i++) units += text.codePointAt(units)! > 0xffff ? 2 : 1;
  return units;
}

/** Offset in Unicode code points of an offset in UTF-16 units. */
export function toPoints(text: string, units: number): number {
  let points = 0;
  for (let at = 0; at < units && at < text.length; points++) at += text.codePointAt(at)! > 0xffff ? 2 : 1;
  return points;
}
