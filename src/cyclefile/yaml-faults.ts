import type { YAMLError } from "yaml";

/** What a fault of YAML's form says to somebody who did not mean to write YAML but a cycle. */
export function yamlFault({ code, message }: YAMLError): { found: string; expected: string } {
  const [sentence = message] = message.split("\n");
  switch (code) {
    case "TAB_AS_INDENT":
      return { found: "a tab before the line's text", expected: "spaces" };
    case "MULTIPLE_DOCS":
      return { found: "a second document (---)", expected: "one cycle a file" };
    case "BAD_INDENT":
    case "MISSING_CHAR":
    case "UNEXPECTED_TOKEN": {
      const closing = /end with a (\S)/.exec(sentence)?.[1];
      if (closing !== undefined) return { found: `no ${closing} where the line or the file ends`, expected: `${closing} to close what stands open` };
      const quote = /closing (["'])/.exec(sentence)?.[1];
      if (quote !== undefined) return { found: `a text that no ${quote} closes`, expected: quote };
      return { found: "text that is no key with its value", expected: "key: value, with a space after the colon and a comma between keys inside { }" };
    }
    case "BLOCK_AS_IMPLICIT_KEY":
    case "MULTILINE_IMPLICIT_KEY":
      return { found: "a line that does not fit those around it", expected: "one key: value a line, keys of one level indented alike" };
    case "BLOCK_IN_FLOW":
      return { found: "a key or list item that no comma parts from what stands before it", expected: "commas between the keys inside { }" };
    case "BAD_SCALAR_START":
      return { found: `a value that begins with ${sentence.at(-1)}`, expected: "a number, a name, or quotes around the text" };
    default:
      return { found: `text that YAML cannot read (${sentence})`, expected: "YAML as in the examples" };
  }
}
