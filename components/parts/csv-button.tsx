'use client';

import { useState } from 'react';
import { sendJson } from '@/components/forms/send-json';
import { csvOf, type GridColumn } from '@/components/grids/grid-columns';
import { pageUrl, type KeysetPage } from '@/components/grids/keyset-source';
import { Button } from '@/components/ui/button';
import { ProblemNotice } from '@/components/ui/notice';
import { problemOf, type Problem } from '@/components/ui/problem';

/** Every row of a list, page by page. */
async function everyRow<Row>(url: string): Promise<Row[]> {
  const rows: Row[] = [];
  let after: string | null = null;
  do {
    const page: KeysetPage<Row> = await sendJson<KeysetPage<Row>>(pageUrl(url, 200, after, undefined), { method: 'GET' });
    rows.push(...page.items);
    after = page.next;
  } while (after !== null);
  return rows;
}

interface Props<Row> {
  readonly label: string;
  readonly name: string;
  readonly url: string;
  readonly columns: readonly GridColumn<Row>[];
}

/** Downloads the whole list, as filtered, as CSV. */
export function CsvButton<Row>({ label, name, url, columns }: Props<Row>) {
  const [busy, setBusy] = useState(false);
  const [problem, setProblem] = useState<Problem>();
  const download = async () => {
    setBusy(true);
    setProblem(undefined);
    try {
      // The mark at the beginning tells spreadsheets that the text is UTF-8.
      const file = new Blob(['\uFEFF', csvOf(columns, await everyRow<Row>(url))], { type: 'text/csv' });
      const address = URL.createObjectURL(file);
      const link = document.createElement('a');
      link.href = address;
      link.download = name;
      link.click();
      URL.revokeObjectURL(address);
    } catch (failure) {
      setProblem(problemOf(failure));
    }
    setBusy(false);
  };
  return (
    <>
      <Button busy={busy} onClick={() => void download()}>
        {label}
      </Button>
      {problem ? <ProblemNotice problem={problem} /> : null}
    </>
  );
}
