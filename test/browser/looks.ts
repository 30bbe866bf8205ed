import type { Browser, Page } from "playwright-core";
import { newPage } from "./lab.js";

/** What the pixels of a picture say about it. */
export interface Pixels {
  /** The mean of the relative luminance of its pixels, 0 black to 1 white. */
  readonly luminance: number;
  /** The number of different colours, counted at 16 steps a channel. */
  readonly colours: number;
}

/** Measures a PNG (in the browser, which can read one). */
export async function pixels(browser: Browser, png: Buffer): Promise<Pixels> {
  const page = await newPage(browser);
  await page.goto("about:blank");
  try {
    return await page.evaluate(async (base64) => {
      const image = new Image();
      image.src = `data:image/png;base64,${base64}`;
      await image.decode();
      const canvas = document.createElement("canvas");
      canvas.width = image.width;
      canvas.height = image.height;
      const context = canvas.getContext("2d")!;
      context.drawImage(image, 0, 0);
      const { data } = context.getImageData(0, 0, image.width, image.height);
      const seen = new Set<number>();
      let sum = 0;
      for (let at = 0; at < data.length; at += 4) {
        const [red, green, blue] = [data[at]!, data[at + 1]!, data[at + 2]!];
        sum += (0.2126 * red + 0.7152 * green + 0.0722 * blue) / 255;
        seen.add(((red >> 4) << 8) | ((green >> 4) << 4) | (blue >> 4));
      }
      return { luminance: sum / (data.length / 4), colours: seen.size };
    }, png.toString("base64"));
  } finally {
    await page.close();
  }
}

/**
 * Text that is hard to read: every visible run of text below an element whose contrast with what lies behind it falls
 * short of a ratio (WCAG 2 contrast ratio; 4.5 is its level for body text, 3 for large text).
 *
 * @returns up to ten of them, with their colours
 */
export function faintText(page: Page, within: string, ratio: number): Promise<string[]> {
  return page.evaluate(
    ([selector, least]) => {
      type Colour = [number, number, number, number];
      const probe = document.createElement("canvas").getContext("2d", { willReadFrequently: true })!;
      const parse = (css: string): Colour => {
        probe.clearRect(0, 0, 1, 1);
        probe.fillStyle = css;
        probe.fillRect(0, 0, 1, 1);
        const [r, g, b, a] = probe.getImageData(0, 0, 1, 1).data;
        return [r!, g!, b!, a! / 255];
      };
      const over = (top: Colour, under: Colour): Colour => {
        const mix = (at: 0 | 1 | 2) => top[at] * top[3] + under[at] * (1 - top[3]);
        return [mix(0), mix(1), mix(2), 1];
      };
      const behind = (element: Element): Colour => {
        const layers: Colour[] = [];
        for (let at: Element | null = element; at; at = at.parentElement) {
          const colour = parse(getComputedStyle(at).backgroundColor);
          if (colour[3] > 0) layers.push(colour);
          if (colour[3] === 1) break;
        }
        return layers.reduceRight((under, top) => over(top, under), [255, 255, 255, 1] as Colour);
      };
      const luminance = (colour: Colour) => {
        const linear = colour.slice(0, 3).map((byte) => {
          const part = byte / 255;
          return part <= 0.04045 ? part / 12.92 : ((part + 0.055) / 1.055) ** 2.4;
        });
        return 0.2126 * linear[0]! + 0.7152 * linear[1]! + 0.0722 * linear[2]!;
      };
      const found: string[] = [];
      for (const top of Array.from(document.querySelectorAll(selector))) {
        const walker = document.createTreeWalker(top, NodeFilter.SHOW_TEXT);
        for (let node = walker.nextNode(); node && found.length < 10; node = walker.nextNode()) {
          const text = node.textContent!.trim();
          const element = node.parentElement!;
          const visible = element.checkVisibility({ checkOpacity: true, checkVisibilityCSS: true });
          if (text === "" || !visible || ["STYLE", "SCRIPT"].includes(element.tagName)) continue;
          const style = getComputedStyle(element);
          const ink = element.closest("svg") ? style.fill : style.color;
          const ground = behind(element);
          const [high, low] = [luminance(over(parse(ink), ground)), luminance(ground)].sort((a, b) => b - a);
          const contrast = (high! + 0.05) / (low! + 0.05);
          if (contrast < least)
            found.push(`"${text.slice(0, 40)}" ${ink} on ${ground.slice(0, 3)}: ${contrast.toFixed(2)}`);
        }
      }
      return found;
    },
    [within, ratio] as const,
  );
}

/**
 * Content that a narrow window cuts off: elements below `within` that stick out of it to the right with no scroll bar
 * that would reach them.
 */
export function cutOff(page: Page, within: string): Promise<string[]> {
  return page.evaluate((selector) => {
    const found: string[] = [];
    for (const top of Array.from(document.querySelectorAll(selector))) {
      for (const element of Array.from(top.querySelectorAll("table, td, p, img, svg, canvas, summary"))) {
        const edge = element.getBoundingClientRect().right;
        let reachable = false;
        for (let at: Element | null = element.parentElement; at; at = at.parentElement) {
          const scrolls = ["auto", "scroll"].includes(getComputedStyle(at).overflowX);
          if (scrolls && at.scrollWidth > at.clientWidth) reachable = true;
          if (at === top) break;
        }
        if (!reachable && edge > top.getBoundingClientRect().right + 1) {
          found.push(
            `${element.tagName.toLowerCase()} "${element.textContent!.trim().slice(0, 30)}" by ${edge}`,
          );
        }
      }
    }
    return found.slice(0, 10);
  }, within);
}

/** Opens everything that is folded away, so that it is looked at too. */
export function unfold(page: Page, within: string): Promise<void> {
  return page.locator(`${within} details`).evaluateAll((details) => {
    for (const detail of details as HTMLDetailsElement[]) detail.open = true;
  });
}
