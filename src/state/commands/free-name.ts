/** The wish itself, or with the least number behind it that makes it unlike every taken name: "cap", "cap 2", "cap 3". */
export function freeName(wish: string, taken: readonly string[]): string {
  if (!taken.includes(wish)) return wish;
  const stem = wish.replace(/ \d+$/, '');
  let n = 2;
  while (taken.includes(`${stem} ${n}`)) n++;
  return `${stem} ${n}`;
}
