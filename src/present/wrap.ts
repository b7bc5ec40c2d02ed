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

/** Where a list of items is broken. */
export interface ItemLayout {
  /** Behind each item but the last. */
  readonly separator: string;
  /** Before the first item: a heading, with whatever space belongs behind it. */
  readonly heading?: string;
  /** Before the first item of each line after the first. */
  readonly indent?: string;
  readonly width?: number;
}

/** Items in lines of at most a width, broken between items; one that is wider than a line by itself also behind its commas. */
export function wrapItems(items: readonly string[], { separator, heading = "", indent = "", width = WIDTH }: ItemLayout): string {
  const lines: string[] = [];
  let line = heading;
  let isEmpty = true;
  const pieces = items
    .map((item, i) => (i < items.length - 1 ? item + separator : item))
    .flatMap((item) => (indent.length + item.length > width ? item.split(/(?<=,) /) : [item]));
  for (const piece of pieces) {
    if (!isEmpty && line.length + 1 + piece.length > width) {
      lines.push(line);
      line = indent + piece;
    } else {
      line += isEmpty ? piece : ` ${piece}`;
    }
    isEmpty = false;
  }
  return [...lines, line.trimEnd()].join("\n");
}
