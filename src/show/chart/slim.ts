/**
 * The same drawing in fewer bytes: coordinates to a hundredth of a pixel, no marks that cannot be seen (those that only
 * carry tooltips), and no description on every single mark (a reader that cannot see gets the description of the whole
 * chart). Texts are left as they are.
 */
export function slim(svg: string): string {
  return svg.replace(/<[^>]*>/g, (tag) => {
    if (/ opacity="0"[^>]*\/>$/.test(tag)) return "";
    return tag
      .replace(' opacity="1"', "")
      .replace(/ (?:aria-[a-z]+|role)="[^"]*"/g, "")
      .replace(/ (d|transform|x|y|x1|x2|y1|y2|width|height)="([^"]*)"/g, (_, name: string, value: string) => {
        const rounded = value.replace(/-?\d+\.\d{3,}(?:e-?\d+)?/g, hundredth);
        return ` ${name}="${rounded}"`;
      });
  });
}

const hundredth = (number: string) => String(Math.round(Number(number) * 100) / 100 + 0);
