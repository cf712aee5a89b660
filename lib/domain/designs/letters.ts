/**
 * The letter after a revision's: A when there is none, then B … Z, AA, AB … ZZ.
 * @throws RangeError for what is no letter of a revision, and after ZZ
 */
export function nextLetter(letter: string | undefined): string {
  if (letter === undefined) return "A";
  if (!/^[A-Z]{1,2}$/.test(letter) || letter === "ZZ") throw new RangeError(`no letter comes after ${letter}`);
  const [first = "", second] = letter;
  const after = (one: string) => String.fromCharCode(one.charCodeAt(0) + 1);
  if (second === undefined) return first === "Z" ? "AA" : after(first);
  return second === "Z" ? `${after(first)}A` : `${first}${after(second)}`;
}
