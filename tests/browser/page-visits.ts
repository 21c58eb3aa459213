import { readdirSync } from 'node:fs';
import type { Page } from 'playwright-core';
import { testAddress } from '../support/stack';

/** Who looks at a page, and how its addresses are found. */
export interface Visit {
  readonly email: string | null;
  /** Addresses of a page about one thing, found through the product's own lists. */
  readonly find?: (page: Page) => Promise<string[]>;
}

const at = (name: string) => `${name}@aldermoor.example`;
const customer = 'quality@tarnside.example';
const auditor = 'auditor@fennick.example';

async function items<Item>(page: Page, call: string): Promise<Item[]> {
  const answer = await page.request.get(`${testAddress()}${call}`);
  return ((await answer.json()) as { items: Item[] }).items;
}

/** The first of a list, at the address of its page. */
const first =
  (call: string, base: string, key = 'id') =>
  async (page: Page): Promise<string[]> => {
    const [one] = await items<Record<string, string>>(page, call);
    return one === undefined ? [] : [`${base}/${String(one[key])}`];
  };

interface Standing {
  readonly id: string;
  readonly requirements: {
    readonly draft: { readonly id: string } | null;
    readonly inspection: { readonly id: string } | null;
  }[];
}

/** One open draft and one signed inspection: T10415 has a draft, T10410 signed walls and an open finding. */
async function benches(page: Page): Promise<string[]> {
  const found: string[] = [];
  for (const serial of ['T10415', 'T10410']) {
    const [part] = await items<{ id: string }>(page, `/api/parts?serial=${serial}`);
    const answer = await page.request.get(`${testAddress()}/api/parts/${part?.id ?? ''}`);
    const { requirements } = (await answer.json()) as Standing;
    const one = requirements.map(({ draft, inspection }) => draft ?? inspection).find((inspected) => inspected !== null);
    if (one) found.push(`/inspections/${one.id}`);
  }
  return found;
}

/** The approved issue of a drawing and the draft that waits beside it. */
async function planIssues(page: Page): Promise<string[]> {
  const plans = await items<{ id: string; state: string }>(page, '/api/drawings/AM-2210/plans');
  return plans.filter(({ state }) => state === 'approved' || state === 'draft').map(({ id }) => `/plans/${id}`);
}

/** Every page of the product by its address in app/; a page that is missing here fails the test that reads this. */
export const visits: Readonly<Record<string, Visit>> = {
  '/sign-in': { email: null },
  '/verify': { email: null },
  '/': { email: at('inspector') },
  '/parts': { email: at('inspector') },
  '/parts/[id]': { email: at('inspector'), find: first('/api/parts?serial=T10410', '/parts') },
  '/inspections/[id]': { email: at('inspector'), find: benches },
  '/lots': { email: at('administrator') },
  '/lots/[id]': { email: at('administrator'), find: first('/api/lots?kind=heat', '/lots') },
  '/holds': { email: at('reviewer') },
  '/review': { email: at('reviewer') },
  '/findings/[number]': { email: at('reviewer'), find: first('/api/findings', '/findings', 'number') },
  '/shipments': { email: at('signatory') },
  '/shipments/[number]': { email: at('signatory'), find: first('/api/shipments', '/shipments', 'number') },
  '/certificates': { email: customer },
  '/certificates/[number]': { email: customer, find: first('/api/certificates', '/certificates', 'number') },
  '/drawings': { email: at('reviewer') },
  '/plans/[id]': { email: at('reviewer'), find: planIssues },
  '/techniques': { email: at('reviewer') },
  '/techniques/[id]': { email: at('reviewer'), find: first('/api/techniques', '/techniques') },
  '/equipment': { email: at('administrator') },
  '/equipment/[id]': { email: at('administrator'), find: first('/api/equipment', '/equipment') },
  '/process-checks': { email: at('inspector') },
  '/suspects': { email: at('reviewer') },
  '/suspects/[id]': { email: at('reviewer'), find: first('/api/suspects', '/suspects') },
  '/baskets': { email: at('inspector') },
  '/baskets/[id]': { email: at('inspector'), find: first('/api/baskets', '/baskets') },
  '/baskets/[id]/tags': {
    email: at('inspector'),
    find: async (page) => (await first('/api/baskets', '/baskets')(page)).map((address) => `${address}/tags`),
  },
  '/runs': { email: at('inspector') },
  '/runs/[id]': { email: at('inspector'), find: first('/api/runs', '/runs') },
  '/workstations': { email: at('administrator') },
  '/personnel': { email: at('reviewer') },
  '/trace': { email: auditor },
  '/trace/[id]': { email: auditor, find: first('/api/parts?serial=T10410', '/trace') },
  '/record': { email: auditor },
  '/orders': { email: at('administrator') },
  '/customers': { email: at('administrator') },
  '/people': { email: at('administrator') },
  '/account': { email: at('inspector') },
};

/** The pages there are, as addresses with their places in brackets. */
export function pagesOfTheProduct(): string[] {
  return readdirSync('app', { recursive: true, encoding: 'utf8' })
    .filter((file) => /(^|\/)page\.tsx$/.test(file))
    .map((file) => `/${file}`.replaceAll(/\/\([^)]*\)/g, '').replace(/\/page\.tsx$/, '') || '/')
    .sort();
}
