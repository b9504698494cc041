/** Two or three letters for cards and screens, from the words of a name: "Ines Rothe" gives IR, "Olle" gives OL. */
export function initialsOf(name: string): string {
  const words = name
    .normalize('NFC')
    .split(/[^\p{L}\p{M}\p{N}]+/u)
    .filter((word) => word !== '');
  const [first] = words;
  if (first === undefined) return '?';
  const letters =
    words.length === 1
      ? [...first].slice(0, 2)
      : words.slice(0, 3).map((word) => [...word][0] ?? '');
  return letters.join('').toLocaleUpperCase('en').slice(0, 3);
}
