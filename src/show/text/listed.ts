import { name } from "./legible.js";

/** Names in a sentence: `fare, rain and fuel`; beyond `most`, `fare, rain and 7 more`. */
export function listed(names: readonly string[], most = 6): string {
  const shown = names.length > most ? names.slice(0, most - 1) : names;
  const rest = names.length - shown.length;
  const words = [...shown.map((one) => name(one, 40)), ...(rest > 0 ? [`${rest} more`] : [])];
  return words.length <= 1 ? (words[0] ?? "") : `${words.slice(0, -1).join(", ")} and ${words.at(-1)}`;
}
