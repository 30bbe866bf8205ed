import { InputError } from "../numeric/index.js";

/** How the errors are assumed to behave when estimating. */
export interface ErrorModel {
  readonly kind: "iid";
  readonly label: string;
}

/** Errors taken as independent with equal variance when estimating: ordinary least squares. */
export function iid(): ErrorModel {
  return { kind: "iid", label: "iid" };
}

/** Refuses what is no error model that this fit can estimate with. */
export function requireErrorModel(errors: unknown): ErrorModel {
  if (errors === undefined) return iid();
  if (typeof errors === "object" && errors !== null && (errors as ErrorModel).kind === "iid")
    return errors as ErrorModel;
  throw new InputError(
    "fit: errors must be iid(); the covariance estimator of m.under(...) judges dependent errors.",
  );
}
