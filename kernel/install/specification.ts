import { join } from "node:path";
import { packageRoot } from "./places.js";

/** The name under which Jupyter knows the kernel (the folder of its specification). */
export const kernelName = "lagbook";

/** A Jupyter kernel specification (the content of kernel.json). */
export interface KernelSpecification {
  readonly argv: readonly string[];
  readonly display_name: string;
  readonly language: string;
  readonly interrupt_mode: "message" | "signal";
  readonly metadata: Readonly<Record<string, unknown>>;
}

/**
 * The specification of this copy of Lagbook, run by this Node. Both are full paths: Jupyter starts kernels in the
 * notebook's folder and with whatever PATH it has itself.
 *
 * Interrupts are messages: a signal would reach the main thread only, and the kernel answers an interrupt from the
 * thread that keeps listening while a cell computes.
 */
export function kernelSpecification(root: string = packageRoot): KernelSpecification {
  return {
    argv: [process.execPath, join(root, "dist", "kernel", "cli.js"), "kernel", "{connection_file}"],
    display_name: "Lagbook",
    language: "typescript",
    interrupt_mode: "message",
    metadata: { debugger: false },
  };
}
