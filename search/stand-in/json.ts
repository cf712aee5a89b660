/** Deepest nesting that the service's own parser follows. */
const DEPTH_MAX = 127;

/**
 * Reads JSON text. What nests more than 127 deep is refused before anything walks through it.
 * @throws SyntaxError for text that is no JSON, or nests too deep
 */
export function parseJson(text: string): unknown {
  const at = tooDeepAt(text);
  if (at !== undefined) throw new SyntaxError(`recursion limit exceeded at character ${at + 1}`);
  return JSON.parse(text) as unknown;
}

/** Where brackets outside of strings first stand more than 127 deep. */
function tooDeepAt(text: string): number | undefined {
  let depth = 0;
  for (let at = 0; at < text.length; at += 1) {
    switch (text.charCodeAt(at)) {
      case 0x22:
        at = endOfString(text, at);
        break;
      case 0x5b:
      case 0x7b:
        depth += 1;
        if (depth > DEPTH_MAX) return at;
        break;
      case 0x5d:
      case 0x7d:
        depth -= 1;
        break;
      default:
    }
  }
  return undefined;
}

/** Place of the quote that closes the string opened at `open`; the text's end where none does. */
function endOfString(text: string, open: number): number {
  for (let at = open + 1; at < text.length; at += 1) {
    const code = text.charCodeAt(at);
    if (code === 0x5c) at += 1;
    else if (code === 0x22) return at;
  }
  return text.length;
}
