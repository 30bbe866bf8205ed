import { type Html, html } from "../text/html.js";

/**
 * An SVG as an image in HTML. JupyterLab takes inline SVG out of untrusted outputs but lets images with data in their
 * address stand, and a browser runs no script in an image.
 */
export function image(svg: string, description: string, style = ""): Html {
  const address = `data:image/svg+xml;base64,${Buffer.from(svg, "utf8").toString("base64")}`;
  return html`<img src="${address}" alt="${description}" style="max-width:100%;height:auto;vertical-align:top;${style}">`;
}
