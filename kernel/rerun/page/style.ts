/**
 * The page's own look. The names that begin with --jp- are the ones that JupyterLab's themes define: outputs that
 * follow the theme in a notebook follow the reader's light or dark setting here.
 */
export const style = `
:root {
  color-scheme: light dark;
  --page: #ffffff; --ink: #1d2329; --faint: #5b6570; --line: #d5dade; --well: #f5f7f8;
  --word: #0060a0; --text: #8a4b00; --figure: #00684c; --alarm: #b03a00; --alarm-well: #fdf1ea;
}
@media screen and (prefers-color-scheme: dark) {
  :root {
    --page: #15191d; --ink: #e3e7ea; --faint: #9aa5ae; --line: #363e45; --well: #1e2429;
    --word: #6cbcf0; --text: #eab45f; --figure: #4cc9a0; --alarm: #ff9a66; --alarm-well: #2f2019;
  }
}
:root {
  --jp-layout-color0: var(--page); --jp-layout-color1: var(--page); --jp-layout-color2: var(--well);
  --jp-border-color1: var(--line); --jp-border-color2: var(--line); --jp-border-color3: var(--line);
  --jp-content-font-color0: var(--ink); --jp-content-font-color1: var(--ink);
  --jp-content-font-color2: var(--faint); --jp-content-font-color3: var(--faint);
  --jp-ui-font-color0: var(--ink); --jp-ui-font-color1: var(--ink); --jp-ui-font-color2: var(--faint);
}
* { box-sizing: border-box; }
body {
  margin: 0 auto; padding: 2rem 1.25rem 4rem; max-width: 60rem; background: var(--page); color: var(--ink);
  font: 16px/1.55 system-ui, -apple-system, "Segoe UI", "Liberation Sans", sans-serif; overflow-wrap: break-word;
}
h1, h2, h3, h4 { line-height: 1.25; margin: 2rem 0 0.75rem; }
h1:first-child { margin-top: 0; }
a { color: var(--word); }
pre, code { font-family: ui-monospace, "Cascadia Mono", "Liberation Mono", monospace; font-size: 0.875rem; }
pre { margin: 0; overflow-x: auto; line-height: 1.45; }
img { max-width: 100%; height: auto; }
.markdown pre, .raw { background: var(--well); padding: 0.75rem 1rem; border-radius: 4px; margin: 1rem 0; }
.markdown table { border-collapse: collapse; display: block; overflow-x: auto; }
.markdown th, .markdown td { border-bottom: 1px solid var(--line); padding: 0.3rem 0.8rem 0.3rem 0; text-align: left; }
.markdown blockquote { margin: 1rem 0; padding-left: 1rem; border-left: 3px solid var(--line); color: var(--faint); }
.code { margin: 1.5rem 0; }
.source { background: var(--well); border-radius: 4px; padding: 0.6rem 1rem; }
.source > summary { cursor: pointer; color: var(--faint); font-size: 0.75rem; user-select: none; }
.output { margin: 0.75rem 0 0; }
.result { overflow-x: auto; }
.stderr, .error { border-left: 3px solid var(--alarm); background: var(--alarm-well); padding: 0.5rem 0.9rem; }
.stopped { border: 1px solid var(--alarm); background: var(--alarm-well); padding: 0.75rem 1rem; border-radius: 4px; }
.aside, footer { color: var(--faint); font-size: 0.8125rem; }
footer { margin-top: 3rem; border-top: 1px solid var(--line); padding-top: 0.75rem; }
.hljs-keyword, .hljs-literal, .hljs-built_in { color: var(--word); }
.hljs-string, .hljs-regexp, .hljs-attr { color: var(--text); }
.hljs-number { color: var(--figure); }
.hljs-comment { color: var(--faint); font-style: italic; }
.ansi-bold { font-weight: 600; }
.ansi-red { color: var(--alarm); } .ansi-green, .ansi-cyan { color: var(--figure); }
.ansi-yellow { color: var(--text); } .ansi-blue, .ansi-magenta { color: var(--word); }
.ansi-black, .ansi-white { color: inherit; }
@media print {
  :root { color-scheme: light; --ink: #000000; }
  body { max-width: none; padding: 0; font-size: 10.5pt; }
  pre { white-space: pre-wrap; }
  .result, .output pre { overflow: visible; }
  .source, .output, .stopped { break-inside: avoid-page; }
  .source > summary { list-style: none; }
  h1, h2, h3 { break-after: avoid; }
}
`;
