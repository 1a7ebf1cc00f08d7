/** A small bounded memory for texts that come again and again (unit words, expressions, combinations). */
export function remember<V>(read: (text: string) => V, most = 1000): (text: string) => V {
  const known = new Map<string, V>();
  return (text) => {
    const hit = known.get(text);
    if (hit !== undefined) return hit;
    const value = read(text);
    // Emptying the whole map keeps the hot path free of bookkeeping; texts are few, so this is rare.
    if (known.size >= most) known.clear();
    if (text.length <= 2000) known.set(text, value);
    return value;
  };
}
