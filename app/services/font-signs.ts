/**
 * The code points that a TrueType font has a glyph for, from its table of characters (formats 4 and 12). Pure.
 * Source: OpenType specification 1.9, "cmap — Character to Glyph Index Mapping Table" (from memory, not seen); the test
 * compares with what fonts are known to have.
 */
export function signsOf(bytes: Uint8Array): Set<number> {
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
  const cmap = tableAt(view, "cmap");
  const signs = new Set<number>();
  for (let i = 0; i < view.getUint16(cmap + 2); i++) {
    const at = cmap + view.getUint32(cmap + 4 + i * 8 + 4);
    const format = view.getUint16(at);
    if (format === 4) addSegments(view, at, signs);
    if (format === 12) addGroups(view, at, signs);
  }
  return signs;
}

function tableAt(view: DataView, tag: string): number {
  for (let i = 0; i < view.getUint16(4); i++) {
    const at = 12 + i * 16;
    const name = String.fromCharCode(...[0, 1, 2, 3].map((k) => view.getUint8(at + k)));
    if (name === tag) return view.getUint32(at + 8);
  }
  throw new Error(`The font has no table "${tag}".`);
}

function addSegments(view: DataView, at: number, signs: Set<number>): void {
  const size = view.getUint16(at + 6);
  for (let k = 0; k < size; k += 2) {
    const last = view.getUint16(at + 14 + k);
    const first = view.getUint16(at + 16 + size + k);
    const delta = view.getUint16(at + 16 + 2 * size + k);
    const rangeAt = at + 16 + 3 * size + k;
    const offset = view.getUint16(rangeAt);
    for (let code = first; code <= last && code < 0xffff; code++) {
      const direct = offset === 0 ? code : view.getUint16(rangeAt + offset + 2 * (code - first));
      if (direct !== 0 && ((direct + delta) & 0xffff) !== 0) signs.add(code);
    }
  }
}

function addGroups(view: DataView, at: number, signs: Set<number>): void {
  for (let g = 0; g < view.getUint32(at + 12); g++) {
    const group = at + 16 + g * 12;
    const [first, last] = [view.getUint32(group), view.getUint32(group + 4)];
    for (let code = first; code <= last; code++) signs.add(code);
  }
}
