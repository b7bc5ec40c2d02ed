/** Columns of a terminal that everything fits. */
export const WIDTH = 100;

/** Text broken between words into lines of at most a width, each indented. */
export function wrap(text: string, indent = "", width = WIDTH): string {
  const lines: string[] = [];
  let line = "";
  for (const word of text.split(/\s+/)) {
    if (line !== "" && indent.length + line.length + 1 + word.length > width) {
      lines.push(indent + line);
      line = word;
    } else {
      line = line === "" ? word : `${line} ${word}`;
    }
  }
  return [...lines, indent + line].join("\n");
}
