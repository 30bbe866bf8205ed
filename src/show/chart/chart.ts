import { Result } from "../../data/index.js";
import { fingerprintOf } from "../record.js";
import { drawSvg } from "./draw.js";
import { type ChartSource, dressed, type VegaLite } from "./spec.js";

/** A chart of a result: interactive where Vega-Lite is drawn, SVG elsewhere, words in a terminal. */
export class Chart extends Result {
  override readonly kind = "chart";
  readonly title: string;
  /** What it shows, in words and figures. */
  readonly description: string;
  /** The Vega-Lite specification (version 5), data included. */
  readonly spec: VegaLite;
  /** Kind of the result it was made of, and which of that kind's charts it is. */
  readonly of: string;
  readonly which: string;
  readonly fingerprint?: string;

  constructor(source: ChartSource, of: Result, which: string) {
    super();
    this.title = source.title;
    this.description = source.description;
    this.spec = dressed(source);
    this.of = of.kind;
    this.which = which;
    const fingerprint = fingerprintOf(of);
    if (fingerprint !== undefined) this.fingerprint = fingerprint;
    Object.freeze(this);
  }

  /** The chart as SVG. */
  toSvg(): Promise<string> {
    return drawSvg(this.spec);
  }

  override toJSON(): Record<string, unknown> {
    return { of: this.of, which: this.which, title: this.title, description: this.description };
  }
}
