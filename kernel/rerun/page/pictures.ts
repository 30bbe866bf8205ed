import { existsSync, readFileSync } from "node:fs";
import { extname, resolve, sep } from "node:path";
import { type Cell, type FileBundle, joined } from "../notebook.js";

const types: Record<string, string> = {
  ".png": "image/png",
  ".jpg": "image/jpeg",
  ".jpeg": "image/jpeg",
  ".gif": "image/gif",
  ".webp": "image/webp",
  ".svg": "image/svg+xml",
};

/**
 * The data address of a picture that a markdown cell names: an attachment of the cell, or a picture file in the
 * notebook's folder or below. Undefined for anything else: a page that stands by itself loads nothing.
 */
export function pictureAddress(source: string, cell: Cell, folder: string | undefined): string | undefined {
  if (/^data:image\/(png|jpeg|gif|webp|svg\+xml)[;,]/.test(source)) return source;
  if (source.startsWith("attachment:")) {
    return bundlePicture(cell.attachments?.[decode(source.slice("attachment:".length))]);
  }
  if (folder === undefined || /^[a-z][a-z\d+.-]*:/i.test(source)) return undefined;
  const file = resolve(folder, decode(source));
  const type = types[extname(file).toLowerCase()];
  if (!type || !file.startsWith(resolve(folder) + sep) || !existsSync(file)) return undefined;
  return `data:${type};base64,${readFileSync(file).toString("base64")}`;
}

/** The data address of the picture in a MIME bundle, if it has one. */
export function bundlePicture(bundle: FileBundle | undefined): string | undefined {
  for (const type of ["image/svg+xml", "image/png", "image/jpeg", "image/gif", "image/webp"]) {
    const value = bundle?.[type];
    if (typeof value !== "string" && !Array.isArray(value)) continue;
    const text = joined(value as string | string[]);
    // A notebook holds SVG as text and every other picture as base64 already.
    const base64 = type === "image/svg+xml" ? Buffer.from(text).toString("base64") : text.replace(/\s/g, "");
    if (!/^[A-Za-z\d+/=]*$/.test(base64)) continue;
    return `data:${type};base64,${base64}`;
  }
  return undefined;
}

function decode(text: string): string {
  try {
    return decodeURIComponent(text);
  } catch {
    return text;
  }
}
