import { existsSync } from "node:fs";
import { run } from "../../kernel/install/command.js";

const places = [
  "/usr/bin/chromium",
  "/usr/bin/chromium-browser",
  "/usr/bin/google-chrome",
  "/Applications/Google Chrome.app/Contents/MacOS/Google Chrome",
];

/** The Chromium to drive: the one that LAGBOOK_CHROMIUM names, or one in the usual places. */
export function findChromium(): string | undefined {
  const named = process.env["LAGBOOK_CHROMIUM"];
  return (named ? [named] : places).find((path) => existsSync(path));
}

/** Runs apt-get where that is possible: on Debian and its kin, as root. Says how it went. */
export async function aptInstall(packages: readonly string[], say: (line: string) => void): Promise<boolean> {
  if (process.getuid?.() !== 0) return false;
  const env = { ...process.env, DEBIAN_FRONTEND: "noninteractive" };
  say(`Installing Debian's ${packages.join(", ")} ...`);
  await run("apt-get", ["update", "-qq"], { env });
  const end = await run("apt-get", ["install", "-y", "-qq", "--no-install-recommends", ...packages], { env });
  if (end.code !== 0) say(`apt-get could not install them:\n${end.text.slice(-800)}`);
  return end.code === 0;
}
