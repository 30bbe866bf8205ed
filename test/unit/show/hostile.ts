/** Names that a page, a picture, a formula reader or a terminal might take for something else. */
export const hostile = [
  `<img src=x onerror="alert(1)">`,
  "<script>alert(2)</script>",
  `"><svg onload=alert(3)>`,
  "a.b[0]['c']\\\\\" + alert(4) + \"",
  "$x$ and \\(y\\) {{z}} |p|q| `code` *b* _i_",
  "line\nbreak\u202e\u001b[31m",
  "=cmd|' /C calc'!A1",
  "image",
  "日本語の列",
] as const;
