/** What the t ratios of a kernel estimator are judged by. */
export type Law = "fixed-b" | "fixed-b limit" | "t" | "normal";

export const laws: readonly Law[] = ["fixed-b", "fixed-b limit", "t", "normal"];

/** Whether a law takes the bandwidth into account. */
export const minds = (law: Law): boolean => law === "fixed-b" || law === "fixed-b limit";
