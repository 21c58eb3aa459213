import { describe, expect, it } from 'vitest';
import { isBench, isHere, navigation, navigationFor, roles } from '../../components/shell/navigation';

const paths = (role: (typeof roles)[number]) => navigationFor(role).flatMap(({ items }) => items.map(({ href }) => href));

describe('the pages that a role is shown', () => {
  it('shows a customer nothing of the foundry but its own certificates', () => {
    expect(paths('customer-quality')).toEqual(['/', '/certificates']);
  });

  it('shows an auditor what can be followed, and nothing that releases or judges', () => {
    expect(paths('auditor')).toEqual([
      '/',
      '/parts',
      '/baskets',
      '/runs',
      '/lots',
      '/holds',
      '/certificates',
      '/drawings',
      '/techniques',
      '/equipment',
      '/process-checks',
      '/suspects',
      '/personnel',
      '/trace',
      '/record',
      '/orders',
      '/customers',
    ]);
  });

  it('keeps judgement with reviewers and people with the administrator', () => {
    expect(roles.filter((role) => paths(role).includes('/people'))).toEqual(['administrator']);
    expect(paths('reviewer')).toContain('/review');
    expect(roles.filter((role) => role !== 'reviewer').some((role) => paths(role).includes('/review'))).toBe(false);
  });

  it('lists every page once', () => {
    expect(new Set(navigation.map(({ href }) => href)).size).toBe(navigation.length);
  });
});

describe('where the reader is', () => {
  it.each([
    ['/', '/', true],
    ['/', '/parts', false],
    ['/parts', '/parts/3', true],
    ['/drawings', '/plans/7', true],
    ['/parts', '/partsbook', false],
  ])('%s at %s: %s', (href, path, expected) => {
    expect(isHere(href, path)).toBe(expected);
  });

  it('gives the bench the whole width, and its list not', () => {
    expect(isBench('/inspections/7')).toBe(true);
    expect(isBench('/baskets')).toBe(false);
  });
});
