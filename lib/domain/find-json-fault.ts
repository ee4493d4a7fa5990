// Engines say in different words, or not at all, where JSON went wrong; people need a line and a column.

const space = /[ \t\n\r]*/y;
const scalar =
  /"(?:[^"\\\u0000-\u001f]|\\(?:["\\/bfnrt]|u[0-9a-fA-F]{4}))*"|-?(?:0|[1-9]\d*)(?:\.\d+)?(?:[eE][-+]?\d+)?|true|false|null/y;

/**
 * Finds where a text stops being JSON.
 *
 * @param text - Text that `JSON.parse` refused.
 * @returns Index of the first character that cannot stand there; the length where the text ends too early.
 * @source RFC 8259, The JavaScript Object Notation (JSON) Data Interchange Format.
 */
export function findJsonFault(text: string): number {
  // what may come next: a value, a key, or what follows a value; the open brackets are kept on a stack, not by recursion
  const open: ('{' | '[')[] = [];
  let expects: 'value' | 'key' | 'after' = 'value';
  let mayClose = false;
  let at = 0;
  const skip = (pattern: RegExp): boolean => {
    pattern.lastIndex = at;
    const match = pattern.exec(text);
    if (match) at += match[0].length;
    return match !== null;
  };
  for (;;) {
    skip(space);
    const character = text[at];
    if (character === undefined) return at;
    const isClosing = character === (open.at(-1) === '{' ? '}' : ']') && open.length > 0;
    if (isClosing && (expects === 'after' || mayClose)) {
      open.pop();
      at++;
      expects = 'after';
      mayClose = false;
    } else if (expects === 'after') {
      if (character !== ',' || open.length === 0) return at;
      at++;
      expects = open.at(-1) === '{' ? 'key' : 'value';
      mayClose = false;
    } else if (expects === 'key') {
      if (character !== '"' || !skip(scalar)) return at;
      skip(space);
      if (text[at] !== ':') return at;
      at++;
      expects = 'value';
      mayClose = false;
    } else if (character === '{' || character === '[') {
      open.push(character);
      at++;
      expects = character === '{' ? 'key' : 'value';
      mayClose = true;
    } else {
      if (!skip(scalar)) return at;
      expects = 'after';
      mayClose = false;
    }
  }
}
