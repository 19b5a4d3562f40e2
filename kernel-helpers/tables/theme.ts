/** Colours of tables, figures and blocks. A test keeps text at 4.5 to 1 against both backgrounds. */
export const theme: Readonly<
  Record<"text" | "mutedText" | "border" | "background" | "shaded" | "accent", string>
> = {
  text: "#16262e",
  mutedText: "#4d5f68",
  border: "#b9c4c6",
  background: "#fffefb",
  shaded: "#eef3f1",
  accent: "#0b5a6b",
};

/** Fonts that most machines have, system fonts first. */
export const typeface: string = "'Source Sans 3','Noto Sans','Segoe UI','DejaVu Sans',Verdana,sans-serif";
