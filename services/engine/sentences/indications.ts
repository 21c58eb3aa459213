import type { SentenceCatalogue } from './sentence';

/** What a rule row says in words. */
export const indicationSentences: SentenceCatalogue = {
  'rule-met': { en: 'Zone {zone}: {kind} is met.', fr: 'Zone {zone} : {kind} respecté.' },
  'rule-met-measured': {
    en: 'Zone {zone}: {kind}, {measured} against {limit}, is met.',
    fr: 'Zone {zone} : {kind}, {measured} pour {limit}, respecté.',
  },
  'rule-broken': {
    en: 'Zone {zone}: {kind} is broken by {indications}.',
    fr: 'Zone {zone} : {kind} non respecté par {indications}.',
  },
  'rule-broken-measured': {
    en: 'Zone {zone}: {kind}, {measured} against {limit}, is broken by {indications}.',
    fr: 'Zone {zone} : {kind}, {measured} pour {limit}, non respecté par {indications}.',
  },
  'crack-rejected': {
    en: 'Zone {zone}: a crack is rejected ({indications}).',
    fr: 'Zone {zone} : une fissure est refusée ({indications}).',
  },
  'no-crack': { en: 'Zone {zone}: no crack.', fr: 'Zone {zone} : aucune fissure.' },
  'rule-not-carried-out': {
    en: 'Zone {zone}: {kind} is not judged, the method was not carried out.',
    fr: 'Zone {zone} : {kind} non jugé, la méthode n’a pas été appliquée.',
  },
  'rule-waits': {
    en: 'Zone {zone}: {kind} waits for what cannot be judged yet ({indications}).',
    fr: 'Zone {zone} : {kind} attend ce qui ne peut pas encore être jugé ({indications}).',
  },
};
