/** Who is signed in, as far as the shell is concerned. */
export const roles = ['inspector', 'reviewer', 'customer-quality', 'auditor', 'administrator'] as const;
export type Role = (typeof roles)[number];

export interface NavigationItem {
  href: string;
  /** Name of the message in the namespace 'shell', under 'pages'. */
  label:
    | 'today'
    | 'parts'
    | 'baskets'
    | 'runs'
    | 'exposures'
    | 'lots'
    | 'holds'
    | 'review'
    | 'shipments'
    | 'certificates'
    | 'concessions'
    | 'rejections'
    | 'drawings'
    | 'techniques'
    | 'equipment'
    | 'personnel'
    | 'processChecks'
    | 'suspects'
    | 'trace'
    | 'insight'
    | 'record'
    | 'people'
    | 'customers'
    | 'orders'
    | 'workstations';
  group: 'work' | 'judgement' | 'basis' | 'history' | 'house';
  roles: readonly Role[];
}

const staff = ['inspector', 'reviewer', 'administrator'] as const;
const judges = ['reviewer', 'administrator'] as const;

/** The pages of the product by role, in the order they are shown. A page that does not exist yet is not listed. */
export const navigation: readonly NavigationItem[] = [
  { href: '/', label: 'today', group: 'work', roles },
  { href: '/parts', label: 'parts', group: 'work', roles: [...staff, 'auditor'] },
  { href: '/baskets', label: 'baskets', group: 'work', roles: [...staff, 'auditor'] },
  { href: '/runs', label: 'runs', group: 'work', roles: [...staff, 'auditor'] },
  { href: '/lots', label: 'lots', group: 'work', roles: [...staff, 'auditor'] },
  { href: '/review', label: 'review', group: 'judgement', roles: ['reviewer'] },
  { href: '/shipments', label: 'shipments', group: 'judgement', roles: judges },
  { href: '/holds', label: 'holds', group: 'judgement', roles: [...staff, 'auditor'] },
  { href: '/certificates', label: 'certificates', group: 'judgement', roles },
  { href: '/drawings', label: 'drawings', group: 'basis', roles: [...staff, 'auditor'] },
  { href: '/techniques', label: 'techniques', group: 'basis', roles: [...judges, 'auditor'] },
  { href: '/equipment', label: 'equipment', group: 'basis', roles: [...judges, 'auditor'] },
  { href: '/process-checks', label: 'processChecks', group: 'basis', roles: [...staff, 'auditor'] },
  { href: '/suspects', label: 'suspects', group: 'basis', roles: [...judges, 'auditor'] },
  { href: '/personnel', label: 'personnel', group: 'basis', roles: [...staff, 'auditor'] },
  { href: '/trace', label: 'trace', group: 'history', roles: [...staff, 'auditor'] },
  { href: '/record', label: 'record', group: 'history', roles: ['reviewer', 'administrator', 'auditor'] },
  { href: '/orders', label: 'orders', group: 'house', roles: [...staff, 'auditor'] },
  { href: '/customers', label: 'customers', group: 'house', roles: [...staff, 'auditor'] },
  { href: '/people', label: 'people', group: 'house', roles: ['administrator'] },
  { href: '/workstations', label: 'workstations', group: 'house', roles: ['administrator'] },
];

/** The items of a role, grouped, in order. */
export function navigationFor(role: Role): { group: NavigationItem['group']; items: NavigationItem[] }[] {
  const groups = new Map<NavigationItem['group'], NavigationItem[]>();
  for (const item of navigation) {
    if (item.roles.includes(role)) groups.set(item.group, [...(groups.get(item.group) ?? []), item]);
  }
  return [...groups].map(([group, items]) => ({ group, items }));
}

/** Whether an item is where the reader is: its page or one below it. */
export function isHere(href: string, path: string): boolean {
  // A plan issue is a reading of a drawing and is found under it.
  if (href === '/drawings' && path.startsWith('/plans/')) return true;
  return href === '/' ? path === '/' : path === href || path.startsWith(`${href}/`);
}

/** Places that need the whole width: the bench. The rail is behind the menu there. */
export function isBench(path: string): boolean {
  return /^\/(inspections|baskets|exposures|runs)\/./.test(path);
}
