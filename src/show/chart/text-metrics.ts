import { width } from "../text/width.js";

const narrow = /[ijlt.,:;'|!()[\]{}/ ]/u;
const broad = /[MWmw%@—…]/u;

/**
 * Width of a text in pixels at a font size, for laying out a chart where there is no canvas to measure on: means of common
 * sans-serif fonts by class of letter, on the broad side. (Vega itself takes 0.8 em for every letter, which leaves gaps.)
 */
export function textWidth(text: string, fontSize: number): number {
  let em = 0;
  for (const c of text) {
    if (narrow.test(c)) em += 0.36;
    else if (broad.test(c)) em += 0.9;
    else if (width(c) === 2) em += 1.05;
    else if (c >= "A" && c <= "Z") em += 0.7;
    else em += 0.6;
  }
  return Math.ceil(em * fontSize);
}
