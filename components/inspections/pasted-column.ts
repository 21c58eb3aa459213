/** A column copied from a spreadsheet, one cell for each line. A blank cell in the middle stays a blank: nothing moves up. */
export function pastedColumn(text: string): string[] {
  const lines = text.split(/\r\n|\n|\r/).map((line) => line.trim());
  while (lines.length > 0 && lines.at(-1) === '') lines.pop();
  return lines;
}
