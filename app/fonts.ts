/**
 * The two typefaces are served from our own origin (see app/styles/fonts.css for the faces and
 * public/fonts for their licences). The root layout preloads these two files, which hold all of
 * Latin-1; the extended sets load only when a name needs them.
 */
export const fontPreloads = [
  "/fonts/archivo-latin-wdth-normal.woff2",
  "/fonts/martian-mono-latin-wdth-normal.woff2",
] as const;
