/**
 * The palette of Okabe and Ito (2008, "Color Universal Design"), told apart with every common kind of colour blindness.
 * Black is left out: it is lost on a dark page.
 */
export const colours = {
  blue: "#0072B2",
  vermillion: "#D55E00",
  green: "#009E73",
  purple: "#CC79A7",
  orange: "#E69F00",
  sky: "#56B4E9",
  yellow: "#F0E442",
} as const;

/** The order in which series take colours: those first that stand out on white and on black alike. */
export const seriesColours = [
  colours.blue,
  colours.vermillion,
  colours.green,
  colours.purple,
  colours.orange,
  colours.sky,
] as const;

/** Line patterns that go with the colours, so that series differ in print too. */
export const dashes = [
  [1, 0],
  [6, 3],
  [2, 2],
  [8, 3, 2, 3],
  [12, 4],
  [4, 2, 1, 2],
] as const;

/** Grey for text in pictures: contrast 4.4 on white and on JupyterLab's darkest grey (#111) alike. */
export const textGrey = "#797979";

/** Grey for axes, marks of zero and frames. */
export const lineGrey = "#8a8a8a";
