// The content security policy of the page: everything from its own server, nothing inline, nothing sent elsewhere.
const RULES = {
  'default-src': "'none'",
  'script-src': "'self'",
  'style-src': "'self'",
  // data: and blob: for figures drawn in the page and saved as pictures.
  'img-src': "'self' data: blob:",
  'font-src': "'self'",
  'connect-src': "'self'",
  'worker-src': "'self'",
  'manifest-src': "'self'",
  'base-uri': "'none'",
  'form-action': "'none'",
};
const text = (rules) => Object.entries(rules).map((rule) => rule.join(' ')).join('; ');

/** For a meta element. */
export const PAGE_POLICY = text(RULES);
/** For a server's header, where the page can also forbid being framed. */
export const SERVER_POLICY = text({ ...RULES, 'frame-ancestors': "'none'" });
