import type { Remark } from "../../result.js";
import type { Dialect } from "./dialect.js";
import type { NumberStyle } from "./number-style.js";
import type { DelimitedContent } from "./strict.js";

/** What a careful reader must be told of how a file was read. */
export function told(dialect: Dialect, style: NumberStyle, content: DelimitedContent): Remark[] {
  const findings: Remark[] = [];
  const say = (text: string) => findings.push({ severity: "note", text });
  const names: Record<string, string> = {
    ";": "semicolons",
    "\t": "tabs",
    "|": "vertical bars",
    " ": "spaces",
  };
  if (dialect.delimiter !== ",") {
    say(`columns are separated by ${names[dialect.delimiter] ?? JSON.stringify(dialect.delimiter)}`);
  }
  if (style.decimal === ",") say("numbers have a decimal comma");
  if (style.thousands) say(`numbers have ${JSON.stringify(style.thousands)} between thousands`);
  if (dialect.encoding === "windows-1252") {
    say("the file is not UTF-8 and was read as Windows-1252, which Latin-1 is a part of");
  } else if (dialect.encoding !== "utf-8") say("the file is encoded in UTF-16");
  if (content.blankLines > 0) {
    const lines = content.blankLines === 1 ? "1 blank line was" : `${content.blankLines} blank lines were`;
    say(`${lines} passed over, first line ${content.firstBlank}`);
  }
  const missing = content.markers.flatMap((markers, i) => {
    if (markers.size === 0) return [];
    const counts = [...markers].map(
      ([marker, count]) => `${count} ${marker === "" ? "blank" : JSON.stringify(marker)}`,
    );
    return [`${counts.join(" and ")} in ${JSON.stringify(dialect.header[i])}`];
  });
  if (missing.length > 0) {
    const more = missing.length > 8 ? `; and in ${missing.length - 8} more columns` : "";
    say(`read as missing: ${missing.slice(0, 8).join("; ")}${more}`);
  }
  return findings;
}
