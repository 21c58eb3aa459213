/** One page of a list of the API: `GET …?limit&after` → `{items, next}`. */
export interface KeysetPage<Row> {
  items: Row[];
  /** Where the next page begins; null after the last. */
  next: string | null;
}

export type FetchPage<Row> = (limit: number, after: string | null) => Promise<KeysetPage<Row>>;

/**
 * Rows by position out of a list that only knows 'after'. The cursor of every page seen is kept, so that scrolling back is
 * one request; a position further on walks there page by page.
 */
export class KeysetSource<Row> {
  private readonly cursors = new Map<number, string | null>([[0, null]]);

  constructor(
    private readonly fetchPage: FetchPage<Row>,
    readonly pageRows: number,
  ) {}

  /** The page that starts at row `start` (a multiple of the page). `lastRow` is the number of rows once known. */
  async page(start: number): Promise<{ rows: Row[]; lastRow: number | undefined }> {
    let from = start;
    while (!this.cursors.has(from)) from -= this.pageRows;
    for (;;) {
      const { items, next } = await this.fetchPage(this.pageRows, this.cursors.get(from) ?? null);
      if (next === null || items.length === 0) {
        return { rows: from === start ? items : [], lastRow: from + items.length };
      }
      if (items.length !== this.pageRows) throw new Error('a page that is not the last must be full');
      this.cursors.set(from + this.pageRows, next);
      if (from === start) return { rows: items, lastRow: undefined };
      from += this.pageRows;
    }
  }
}

/** The address of one page of a list. */
export function pageUrl(url: string, limit: number, after: string | null, sort: string | undefined): string {
  const [path = '', query = ''] = url.split('?');
  const parameters = new URLSearchParams(query);
  parameters.set('limit', String(limit));
  if (after !== null) parameters.set('after', after);
  if (sort !== undefined) parameters.set('sort', sort);
  return `${path}?${parameters.toString()}`;
}
