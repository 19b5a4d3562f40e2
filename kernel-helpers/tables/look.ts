/**
 * Colours of everything shown. Text colours keep at least 4.5 to 1 against `paper` and `shade`; a test
 * measures it.
 */
export const look: Readonly<Record<"ink" | "quiet" | "line" | "paper" | "shade" | "accent", string>> = {
  ink: "#16262e",
  quiet: "#4d5f68",
  line: "#b9c4c6",
  paper: "#fffefb",
  shade: "#eef3f1",
  accent: "#0b5a6b",
};

/** Fonts that most machines have, the plain ones of the system first. */
export const typeface: string = "'Source Sans 3','Noto Sans','Segoe UI','DejaVu Sans',Verdana,sans-serif";
