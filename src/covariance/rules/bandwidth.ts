import { type Remark, suggestion } from "../../data/index.js";
import { InputError } from "../../numeric/index.js";
import type { Kernel } from "../kernels.js";
import { caution, listed, note } from "../remarks.js";
import { andrewsBandwidth, CAP } from "./andrews.js";
import { cubeRootBandwidth, squareRootBandwidth } from "./growth.js";
import { hasNeweyWest1994, neweyWest1994Bandwidth } from "./newey-west-1994.js";
import type { RawScores } from "./raw-scores.js";

export type BandwidthRule = "andrews" | "newey-west" | "square-root" | "cube-root";

export const bandwidthRules: readonly BandwidthRule[] = ["andrews", "newey-west", "square-root", "cube-root"];

const titles: Record<BandwidthRule, string> = {
  andrews: "Andrews' plug-in",
  "newey-west": "Newey–West (1994) plug-in",
  "square-root": "1.3 √T",
  "cube-root": "0.75 T^(1/3)",
};

export const ruleTitle = (rule: BandwidthRule): string => titles[rule];

/** Refuses what is no bandwidth for this kernel. */
export function requireBandwidth(bandwidth: number | BandwidthRule, kernel: Kernel, asked: string): void {
  if (typeof bandwidth === "number") {
    if (Number.isFinite(bandwidth) && bandwidth > 0) return;
    throw new InputError(
      `${asked}: a bandwidth is a number above 0, not ${bandwidth}. Up to 1 no lag weighs in (except with the quadratic ` +
        `spectral and Daniell kernels); L lags of Bartlett's weights are bandwidth L + 1.`,
    );
  }
  if (!bandwidthRules.includes(bandwidth)) {
    throw new InputError(
      `${asked}: there is no bandwidth rule "${bandwidth}".${suggestion(bandwidth, bandwidthRules)}`,
    );
  }
  if (bandwidth === "newey-west" && !hasNeweyWest1994(kernel)) {
    throw new InputError(
      `${asked}: Newey and West (1994) give no rule for the ${kernel.title} kernel, only for Bartlett, Parzen and quadratic ` +
        `spectral. Use "andrews" or a number.`,
    );
  }
}

export interface ChosenBandwidth {
  readonly bandwidth: number;
  /** How it came about, in words. */
  readonly rule: string;
  readonly fromData: boolean;
  readonly details: Readonly<Record<string, number | string | boolean | null>>;
  readonly remarks: readonly Remark[];
}

/** The bandwidth that a number or a rule gives on these scores of a sample of T periods over `span` calendar ones. */
export function chooseBandwidth(
  wanted: number | BandwidthRule,
  kernel: Kernel,
  scores: RawScores,
  { T, span }: { readonly T: number; readonly span: number },
  asked: string,
): ChosenBandwidth {
  if (typeof wanted === "number") {
    if (wanted > span) {
      throw new InputError(
        `${asked}: bandwidth ${wanted} is longer than the sample of ${span} periods, and critical values end there. ` +
          `Ask for at most ${span}.`,
      );
    }
    return { bandwidth: wanted, rule: "given", fromData: false, details: {}, remarks: [] };
  }
  const rule = ruleTitle(wanted);
  if (wanted === "square-root" || wanted === "cube-root") {
    const bandwidth = wanted === "square-root" ? squareRootBandwidth(T) : cubeRootBandwidth(T);
    return { bandwidth: Math.min(bandwidth, span), rule, fromData: false, details: {}, remarks: [] };
  }
  const found = wanted === "andrews" ? andrews(kernel, scores) : neweyWest1994(kernel, scores);
  const bandwidth = Math.min(found.bandwidth, span);
  const remarks = [...found.remarks];
  if (bandwidth < found.bandwidth) {
    remarks.push(
      caution(
        `The rule asked for bandwidth ${found.bandwidth.toFixed(1)}; held at the sample's ${span} periods.`,
      ),
    );
  }
  return { bandwidth, rule, fromData: true, details: found.details, remarks };
}

type Found = Pick<ChosenBandwidth, "bandwidth" | "details" | "remarks">;

function andrews(kernel: Kernel, scores: RawScores): Found {
  const { bandwidth, alpha, rho, capped } = andrewsBandwidth(kernel, scores);
  const details: Record<string, number | string | boolean | null> = {
    [kernel.order === 1 ? "alpha(1)" : "alpha(2)"]: alpha,
  };
  scores.terms.forEach((term, a) => {
    if (scores.weighted[a]) details[`rho: ${term}`] = rho[a]!;
  });
  const remarks: Remark[] = [];
  if (capped.length > 0) {
    remarks.push(
      caution(
        `The plug-in is at its cap: the first-order coefficient of the scores of ${listed(capped)} was held at ${CAP}, so the bandwidth may be too short.`,
      ),
    );
  }
  if (kernel.name === "truncated") {
    remarks.push(note("The plug-in constant of the truncated kernel is half the quadratic spectral one."));
  }
  return { bandwidth, details, remarks };
}

function neweyWest1994(kernel: Kernel, scores: RawScores): Found {
  const { bandwidth, preTruncation, s0, sq, gamma } = neweyWest1994Bandwidth(kernel, scores);
  const details = { "pre-truncation lag": preTruncation, "s(0)": s0, [`s(${kernel.order})`]: sq, gamma };
  return { bandwidth, details, remarks: [] };
}
