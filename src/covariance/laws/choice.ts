/** What the t ratios of a kernel estimator are judged by. */
export type Law = "fixed-b" | "t" | "normal";

export const laws: readonly Law[] = ["fixed-b", "t", "normal"];
