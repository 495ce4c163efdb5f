/** Records of an RFC 4180 text, quotes undone; throws on a bare quote or a lone line feed outside quotes. */
export function readCsv(text: string): string[][] {
  const records: string[][] = [];
  let record: string[] = [];
  let i = 0;
  while (i < text.length) {
    let cell = '';
    if (text[i] === '"') {
      i++;
      for (; !(text[i] === '"' && text[i + 1] !== '"'); i++) {
        if (i >= text.length) throw new Error('a quote is not closed');
        if (text[i] === '"') i++;
        cell += text[i];
      }
      i++;
    } else {
      while (i < text.length && text[i] !== ',' && text[i] !== '\r') {
        if (text[i] === '"' || text[i] === '\n') throw new Error(`bare ${JSON.stringify(text[i])} at ${i}`);
        cell += text[i++];
      }
    }
    record.push(cell);
    if (text[i] === ',') i++;
    else if (text.startsWith('\r\n', i)) {
      i += 2;
      records.push(record);
      record = [];
    } else throw new Error(`no end of the cell at ${i}`);
  }
  return records;
}
