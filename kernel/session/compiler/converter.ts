import type * as TypeScript from "@tslab/typescript-for-tslab";
import type * as Tslab from "tslab/dist/converter.js";

/** tslab's converter. */
export type Converter = Tslab.Converter;
/** A diagnostic of tslab's converter. */
export type Diagnostic = Tslab.Diagnostic;
/** A completion of tslab's converter. */
export type CompletionInfo = Tslab.CompletionInfo;
/** Quick information of the TypeScript services. */
export type QuickInfo = TypeScript.QuickInfo;
