import { InputError } from "../../../numeric/index.js";

/** How the numbers of a file are written. */
export interface NumberStyle {
  readonly decimal: "." | ",";
  /** What stands between thousands; undefined where nothing may. */
  readonly thousands: string | undefined;
  /** The number that a field is in this style; NaN when it is none. Spaces around it do not count. */
  read(field: string): number;
}

/** Makes the style with the given decimal sign and separator of thousands. */
export function numberStyle(decimal: "." | ",", thousands?: string): NumberStyle {
  const point = decimal === "." ? "\\." : ",";
  const plain = new RegExp(`^[+-]?(?:\\d+${point}?\\d*|${point}\\d+)(?:[eE][+-]?\\d+)?$`);
  const infinite = /^[+-]?inf(?:inity)?$/i;
  const separator = thousands === undefined ? undefined : separators(thousands);
  const grouped =
    separator === undefined
      ? undefined
      : new RegExp(`^[+-]?\\d{1,3}(?:${separator}\\d{3})+(?:${point}\\d*)?$`);
  const strip = separator === undefined ? undefined : new RegExp(separator, "g");
  return {
    decimal,
    thousands,
    read(field) {
      const text = field.trim();
      if (plain.test(text)) return Number(decimal === "." ? text : text.replace(",", "."));
      if (grouped?.test(text)) {
        const bare = text.replace(strip!, "");
        return Number(decimal === "." ? bare : bare.replace(",", "."));
      }
      if (infinite.test(text))
        return text.startsWith("-") ? Number.NEGATIVE_INFINITY : Number.POSITIVE_INFINITY;
      return Number.NaN;
    },
  };
}

/** Any kind of space stands for any other, and so do the two apostrophes. */
function separators(thousands: string): string {
  if (/^[\s\u00a0\u202f]$/.test(thousands)) return "[ \\u00a0\\u202f]";
  if (/^['’]$/.test(thousands)) return "['’]";
  return thousands.replace(/[.*+?^${}()|[\]\\]/g, "\\$&");
}

/** What the options say of numbers. */
export interface StyleOptions {
  readonly decimal?: "." | ",";
  readonly thousands?: string;
}

const commaThousands = numberStyle(".", ",");
const commaDecimal = numberStyle(",");
/** In order of preference among those that read the same number of fields. */
const known: readonly NumberStyle[] = [
  numberStyle("."),
  commaDecimal,
  numberStyle(".", " "),
  numberStyle(",", " "),
  numberStyle(".", "'"),
  numberStyle(",", "'"),
  numberStyle(",", "."),
  commaThousands,
];

/**
 * The style that reads the most of the fields. Throws InputError when fields like 1,234 leave it open whether the
 * comma is a decimal sign.
 */
export function styleOf(fields: readonly string[], options: StyleOptions, file: string): NumberStyle {
  if (options.decimal !== undefined || options.thousands !== undefined) {
    const decimal =
      options.decimal ?? (options.thousands === "," ? "." : options.thousands === "." ? "," : ".");
    if (decimal === options.thousands) {
      throw new InputError(`load: decimal and thousands are both ${JSON.stringify(decimal)}.`);
    }
    return numberStyle(decimal, options.thousands);
  }
  const counts = known.map((style) => fields.filter((field) => !Number.isNaN(style.read(field))).length);
  const most = Math.max(...counts);
  const best = known.filter((_, i) => counts[i] === most);
  if (best[0] === commaDecimal && best.includes(commaThousands)) {
    const field = fields.find((text) => !Number.isNaN(commaThousands.read(text)) && text.includes(","));
    throw new InputError(
      `load: ${file}: in ${JSON.stringify(field)} the comma may stand before decimals or between thousands. ` +
        'Say decimal: "," or thousands: ",".',
    );
  }
  return best[0]!;
}
