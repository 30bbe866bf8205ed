import { cellContext } from "./cell-context.js";

let captured = false;

/** Sends what a cell writes to standard output and error to the cell; anything else goes where it went before. */
export function captureStreams(): void {
  if (captured) return;
  captured = true;
  capture(process.stdout, "stdout");
  capture(process.stderr, "stderr");
}

function capture(stream: NodeJS.WriteStream, name: "stdout" | "stderr"): void {
  const write = stream.write.bind(stream) as (...args: unknown[]) => boolean;
  stream.write = ((chunk: unknown, encoding?: unknown, done?: unknown): boolean => {
    const cell = cellContext.getStore();
    if (!cell) return write(chunk, encoding, done);
    const text = typeof chunk === "string" ? chunk : Buffer.from(chunk as Uint8Array).toString("utf8");
    cell.emit({ type: "stream", name, text });
    const callback = typeof encoding === "function" ? encoding : done;
    if (typeof callback === "function") queueMicrotask(callback as () => void);
    return true;
  }) as typeof stream.write;
}
