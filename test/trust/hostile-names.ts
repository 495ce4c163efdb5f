/** Names that would be something else than text where they are not treated as text: markup, formulas of a spreadsheet, controls, parts of a PDF, addresses. */
export const NAMES = [
  '<script>alert(1)</script>', '"><img src=x onerror=alert(1)>', "'><svg/onload=alert(1)>", ']]><script>1</script>', '<!--', '--><b>', '&lt;script&gt;', '&#x3c;script&#x3e;', '{{7*7}}${7*7}',
  '=HYPERLINK("http://x","y")', '+1+1', '-1+1', '@SUM(A1)', '\t=1+1', '\r\n=1+1', '＝1+1', '"=1+1', ',=1+1', ';=1+1', "=cmd|' /C calc'!A0", 'a\u0000b', 'a\u202egnp.exe', 'a\ud800b', 'a\nb\tc',
  ') Tj ET /JS (app.alert(1)) BT (', '\\) >> endobj 1 0 obj << /OpenAction', '%PDF-', 'javascript:alert(1)', 'url(http://x)', '\u2028\u2029', 'A'.repeat(3000),
];
