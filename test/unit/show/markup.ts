// A strict reader of the HTML that cards are made of. It knows only what JupyterLab 4.6 lets through in an untrusted
// notebook (packages/apputils/src/sanitizer.ts of its public source, and looked at in a browser), so that whatever it
// accepts is drawn there as it was meant.

const tags = new Set(
  "div span p strong code table caption thead tbody tr th td details summary img br".split(" "),
);
const empty = new Set(["img", "br"]);
const attributes: Record<string, readonly string[]> = {
  "*": ["style", "title"],
  div: ["class"],
  img: ["src", "alt"],
  th: ["scope", "colspan", "rowspan"],
  td: ["colspan", "rowspan"],
  details: ["open"],
};
const length = String.raw`-?\d*\.?\d+(?:px|em|%)|0`;
const colour = String.raw`#[0-9A-Fa-f]{6}|rgba\(\d+,\d+,\d+,0?\.\d+\)|transparent`;
const border = `none|(?:\\d*\\.?\\d+px) (?:solid|dashed|dotted) (?:${colour})`;
const styles: Record<string, RegExp> = Object.fromEntries(
  Object.entries({
    background: "none",
    border: `${border}`,
    "border-left": border,
    "border-right": border,
    "border-top": border,
    "border-bottom": border,
    "border-collapse": "collapse",
    "border-radius": "50%",
    "box-sizing": "content-box|border-box",
    "caption-side": "top",
    "column-gap": length,
    cursor: "pointer",
    display: "grid|block",
    float: "right",
    "font-size": "\\d*\\.?\\d+em",
    "font-style": "normal",
    // The one property that an untrusted notebook loses: digits of one width, which most fonts have anyway.
    "font-variant-numeric": "tabular-nums",
    "font-weight": "bold|normal",
    "grid-template-columns": "max-content 1fr",
    height: `${length}|auto`,
    left: length,
    "line-height": "\\d*\\.?\\d+",
    margin: `(?:(?:${length})\\s*){1,4}`,
    "margin-left": length,
    "margin-top": length,
    "max-width": length,
    "min-width": length,
    opacity: "0\\.\\d+",
    "overflow-wrap": "break-word",
    "overflow-x": "auto",
    padding: `(?:(?:${length})\\s*){1,4}`,
    "page-break-inside": "avoid",
    position: "relative|absolute",
    right: length,
    "table-layout": "auto",
    "text-align": "left|right|center",
    top: length,
    "vertical-align": "top|middle|bottom",
    "white-space": "normal|nowrap|pre-wrap",
    width: `${length}|auto`,
  }).map(([property, value]) => [property, new RegExp(`^(?:${value})$`)]),
);

/** What is wrong with a piece of HTML: unknown tags, attributes or styles, tags that do not nest, bare signs in text. */
export function faults(markup: string): string[] {
  const found: string[] = [];
  const open: string[] = [];
  let at = 0;
  const tag = /<(\/?)([a-z0-9]+)((?:\s+[a-z-]+(?:="[^"<>]*")?)*)\s*>/y;
  while (at < markup.length) {
    const next = markup.indexOf("<", at);
    text(markup.slice(at, next === -1 ? undefined : next), found);
    if (next === -1) break;
    tag.lastIndex = next;
    const match = tag.exec(markup);
    if (!match) {
      found.push(`no tag: ${markup.slice(next, next + 60)}`);
      at = next + 1;
      continue;
    }
    const [whole, closing, name, inner] = match as unknown as [string, string, string, string];
    if (!tags.has(name)) found.push(`tag <${name}>`);
    if (closing) {
      const last = open.pop();
      if (last !== name) found.push(`</${name}> closes <${last}>`);
    } else {
      if (!empty.has(name)) open.push(name);
      found.push(...wrongAttributes(name, inner));
    }
    at = next + whole.length;
  }
  if (open.length > 0) found.push(`left open: ${open.join(", ")}`);
  return found;
}

function text(content: string, found: string[]): void {
  if (content.includes(">")) found.push(`bare > in ${content.slice(0, 60)}`);
  for (const [sign] of content.matchAll(/&(?!(?:amp|lt|gt|quot|#39);)/g)) found.push(`bare ${sign}`);
}

function wrongAttributes(tag: string, inner: string): string[] {
  const found: string[] = [];
  for (const [, name, value = ""] of inner.matchAll(/([a-z-]+)(?:="([^"]*)")?/g)) {
    if (!attributes["*"]!.includes(name!) && !attributes[tag]?.includes(name!)) {
      found.push(`<${tag} ${name}>`);
    }
    if (name === "style") found.push(...wrongStyles(value));
    if (name === "src" && !/^data:image\/svg\+xml;base64,[A-Za-z0-9+/]+=*$/.test(value)) {
      found.push(`src ${value.slice(0, 40)}`);
    }
  }
  return found;
}

function wrongStyles(style: string): string[] {
  return style
    .split(";")
    .filter((declaration) => declaration !== "")
    .flatMap((declaration) => {
      const [property, value] = declaration.split(":") as [string, string];
      const allowed = styles[property];
      return allowed?.test(value) ? [] : [`style ${declaration}`];
    });
}

/** The pictures in a piece of HTML, as SVG. */
export function picturesIn(markup: string): string[] {
  return [...markup.matchAll(/src="data:image\/svg\+xml;base64,([^"]*)"/g)].map((match) =>
    Buffer.from(match[1]!, "base64").toString("utf8"),
  );
}

/** What a browser shows of a piece of HTML: its text with entities read. */
export function shownText(markup: string): string {
  const entity: Record<string, string> = { amp: "&", lt: "<", gt: ">", quot: '"', "#39": "'" };
  return markup
    .replace(/<[^>]*>/g, " ")
    .replace(/&(amp|lt|gt|quot|#39);/g, (_, name: string) => entity[name]!);
}

/** What in an SVG could run, load or leave it. */
export function svgFaults(svg: string): string[] {
  const found: string[] = [];
  if (!svg.startsWith("<svg")) found.push("does not start with <svg");
  for (const [, name] of svg.matchAll(/<\/?([A-Za-z]+)/g)) {
    if (
      !["svg", "g", "path", "text", "rect", "line", "defs", "clipPath", "circle", "tspan"].includes(name!)
    ) {
      found.push(`<${name}>`);
    }
  }
  // Within tags only: a name from the data may say "onload=" in a text.
  for (const [whole] of svg.matchAll(/<[a-zA-Z][^>]*>/g)) {
    if (/\s(?:on\w+|href|xlink:href)\s*=/.test(whole.replace(/="[^"]*"/g, '=""')))
      found.push(whole.slice(0, 80));
  }
  return found;
}
