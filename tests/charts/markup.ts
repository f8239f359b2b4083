/** Throws where markup is not well formed: an end that does not match, an attribute twice, a stray sign. */
export function assertWellFormed(markup: string): void {
  const open: string[] = [];
  const token = /<(\/?)([a-zA-Z][\w:-]*)((?:\s+[\w:-]+="[^"<]*")*)\s*(\/?)>|([^<]+)|([\s\S])/g;
  for (const [whole, closing, name, attributes, selfClosing, text, stray] of markup.matchAll(token)) {
    if (stray !== undefined) throw new Error(`A stray “${stray}”`);
    if (text !== undefined) {
      if (/&(?!(amp|lt|gt|quot|#x?[0-9a-f]+);)/i.test(text)) throw new Error(`A bare “&” in “${text}”`);
      continue;
    }
    const names = [...attributes.matchAll(/\s([\w:-]+)=/g)].map((match) => match[1]);
    if (new Set(names).size !== names.length) throw new Error(`An attribute twice in ${whole}`);
    if (selfClosing) continue;
    if (!closing) open.push(name);
    else if (open.pop() !== name) throw new Error(`${whole} ends what was not begun`);
  }
  if (open.length > 0) throw new Error(`Never ended: ${open.join(", ")}`);
}
