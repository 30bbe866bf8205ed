import { accessSync, constants } from "node:fs";
import { delimiter, join } from "node:path";

const openers = [
  "xdg-open",
  "x-www-browser",
  "www-browser",
  "firefox",
  "chromium",
  "google-chrome",
  "sensible-browser",
];

function onPath(name: string, path: string): boolean {
  return path.split(delimiter).some((folder) => {
    try {
      accessSync(join(folder, name), constants.X_OK);
      return true;
    } catch {
      return false;
    }
  });
}

/** Whether a browser window could open here: not under CI, and with a display and something that opens pages. */
export function canOpenBrowser(
  environment: NodeJS.ProcessEnv = process.env,
  platform: NodeJS.Platform = process.platform,
): boolean {
  if (environment["CI"] && environment["CI"] !== "false") return false;
  if (platform === "darwin" || platform === "win32") return true;
  if (!environment["DISPLAY"] && !environment["WAYLAND_DISPLAY"]) return false;
  return Boolean(environment["BROWSER"]) || openers.some((name) => onPath(name, environment["PATH"] ?? ""));
}
