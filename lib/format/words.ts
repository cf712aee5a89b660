/** "7", "7 or 9", "7, 9 or 11". Empty gives "". */
export function listWords(items: readonly string[], last: "and" | "or" = "and"): string {
  if (items.length < 2) return items[0] ?? "";
  return `${items.slice(0, -1).join(", ")} ${last} ${items[items.length - 1] ?? ""}`;
}

/** "1 design", "3 designs"; an irregular plural is given. */
export function countWords(count: number, one: string, many = `${one}s`): string {
  return `${count.toLocaleString("en-GB").replaceAll(",", "\u202f")} ${count === 1 ? one : many}`;
}

const smallNumbers = ["no", "one", "two", "three", "four", "five", "six", "seven", "eight", "nine", "ten"];

/** A small count in words, "two"; above ten in figures. */
export function numberWord(count: number): string {
  return smallNumbers[count] ?? String(count);
}
