import { createTranslator } from 'use-intl/core';
import { describe, expect, it } from 'vitest';
import { catalogue } from '../../components/theme/catalogue';
import { localeFrom, locales } from '../../components/theme/locales';

type Entry = readonly [name: string, text: string];

function flatten(tree: object, prefix = ''): Entry[] {
  return Object.entries(tree).flatMap(([name, value]: [string, unknown]): Entry[] => {
    const path = prefix === '' ? name : `${prefix}.${name}`;
    return typeof value === 'object' && value !== null ? flatten(value, path) : [[path, String(value)]];
  });
}

/** The parameters of an ICU message: `{count, plural, …}` and `{name}`. */
function parameters(text: string): string[] {
  // Inside a plural or a choice the branches stand in braces too; elsewhere every brace is a parameter.
  const branches = /,\s*(?:plural|select|selectordinal)\s*,/.test(text);
  const plain = branches ? text.replace(/(?:zero|one|two|few|many|other|=\d+|[a-z-]+)\s*\{[^{}]*\}/g, '') : text;
  return [...new Set([...plain.matchAll(/\{\s*([a-zA-Z][a-zA-Z0-9]*)\s*[,}]/g)].map((match) => match[1] ?? ''))].sort();
}

const english = flatten(catalogue.en);
const french = new Map(flatten(catalogue.fr));

describe('the message catalogues', () => {
  it('say the same things in both languages', () => {
    expect([...french.keys()].sort()).toEqual(english.map(([name]) => name).sort());
  });

  it.each(locales)('leave nothing empty in %s', (locale) => {
    expect(flatten(catalogue[locale]).filter(([, text]) => text.trim() === '')).toEqual([]);
  });

  it('take the same parameters in both languages', () => {
    const differing = english.filter(([name, text]) => parameters(text).join() !== parameters(french.get(name) ?? '').join());
    expect(differing.map(([name]) => name)).toEqual([]);
  });

  it.each(locales)('are well-formed in %s', (locale) => {
    const faults: string[] = [];
    const translate = createTranslator({
      locale,
      messages: catalogue[locale],
      timeZone: 'UTC',
      // A missing parameter is not a fault of the sentence; a sentence that cannot be parsed is.
      onError: (error) => faults.push(error.code === 'INVALID_MESSAGE' ? error.message : ''),
    }) as unknown as (name: string) => string;
    for (const [name] of english) translate(name);
    expect(faults.filter((fault) => fault !== '')).toEqual([]);
  });
});

describe('the language of a request', () => {
  it.each([
    ['fr', null, 'fr'],
    ['fr', 'en', 'fr'],
    [undefined, 'fr-CA,fr;q=0.9,en;q=0.5', 'fr'],
    [undefined, 'de, en;q=0.4, fr;q=0.8', 'fr'],
    [undefined, 'fr;q=0, en', 'en'],
    [undefined, 'de', 'en'],
    ['klingon', null, 'en'],
  ] as const)('chosen %s, accepted %s: %s', (chosen, accepted, expected) => {
    expect(localeFrom(chosen, accepted)).toBe(expected);
  });
});
