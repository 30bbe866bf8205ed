/**
 * What Lagbook throws when a request cannot be met: a message that says what was asked, which row, column
 * or term is wrong, and the way out. Notebooks show it without a stack, since the fault is in the request.
 */
export class InputError extends Error {
  override readonly name = "InputError";
}
