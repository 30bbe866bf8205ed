import highlighter from "highlight.js/lib/core";
import json from "highlight.js/lib/languages/json";
import python from "highlight.js/lib/languages/python";
import sql from "highlight.js/lib/languages/sql";
import typescript from "highlight.js/lib/languages/typescript";
import { escapeHtml } from "./escape.js";

highlighter.registerLanguage("typescript", typescript);
highlighter.registerLanguage("json", json);
highlighter.registerLanguage("sql", sql);
highlighter.registerLanguage("python", python);

/** Code as HTML with its words marked by class (`hljs-keyword` and so on); an unknown language is only escaped. */
export function codeToHtml(code: string, language: string): string {
  if (!highlighter.getLanguage(language)) return escapeHtml(code);
  return highlighter.highlight(code, { language, ignoreIllegals: true }).value;
}
