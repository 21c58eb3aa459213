import type { SentenceCatalogue } from './sentence';

/** Sentences about readings, attributes, process values and the whole. */
export const readingSentences: SentenceCatalogue = {
  'reading-accepted': { en: '{value} {unit} conforms.', fr: '{value} {unit} est conforme.' },
  'reading-outside': { en: '{value} {unit} is outside the limits.', fr: '{value} {unit} est hors des limites.' },
  'reading-accepted-guarded': {
    en: '{value} {unit} lies in the acceptance zone, guard band {guard} {unit}.',
    fr: '{value} {unit} est dans la zone d’acceptation, bande de garde {guard} {unit}.',
  },
  'reading-rejected-guarded': {
    en: '{value} {unit} does not lie in the acceptance zone, guard band {guard} {unit}.',
    fr: '{value} {unit} n’est pas dans la zone d’acceptation, bande de garde {guard} {unit}.',
  },
  'reading-proved-outside': {
    en: '{value} {unit} is outside the limits by more than the guard band of {guard} {unit}.',
    fr: '{value} {unit} est hors des limites de plus que la bande de garde de {guard} {unit}.',
  },
  'reading-unsure-inside': {
    en: '{value} {unit} is inside the limits, but within the guard band of {guard} {unit}: measure better.',
    fr: '{value} {unit} est dans les limites, mais dans la bande de garde de {guard} {unit} : mesurer mieux.',
  },
  'reading-unsure-outside': {
    en: '{value} {unit} is outside the limits, but within the guard band of {guard} {unit}: measure better.',
    fr: '{value} {unit} est hors des limites, mais dans la bande de garde de {guard} {unit} : mesurer mieux.',
  },
  'reading-accepted-risk': {
    en: '{value} {unit} conforms with probability {probability}; the risk allowed is {risk}.',
    fr: '{value} {unit} est conforme avec la probabilité {probability} ; le risque admis est {risk}.',
  },
  'reading-rejected-risk': {
    en: '{value} {unit} conforms with probability {probability} only; the risk allowed is {risk}.',
    fr: '{value} {unit} n’est conforme qu’avec la probabilité {probability} ; le risque admis est {risk}.',
  },
  'reading-unsure-risk': {
    en: '{value} {unit} conforms with probability {probability}: too little to accept and too much to reject at a risk of {risk}.',
    fr: '{value} {unit} est conforme avec la probabilité {probability} : trop peu pour accepter, trop pour refuser au risque {risk}.',
  },
  'reading-capability-missed': {
    en: 'The uncertainty of {uncertainty} {unit} is too large: the tolerance must be at least {capability} times twice it.',
    fr: 'L’incertitude de {uncertainty} {unit} est trop grande : la tolérance doit valoir au moins {capability} fois son double.',
  },
  'reading-without-uncertainty': {
    en: '{value} {unit} cannot be judged: its decision rule needs an uncertainty.',
    fr: '{value} {unit} ne peut être jugé : sa règle de décision exige une incertitude.',
  },
  'reading-void': { en: '{value} {unit} is void: {reason}', fr: '{value} {unit} est annulé : {reason}' },
  'reading-no-zone': {
    en: 'The guard band of {guard} {unit} leaves no acceptance zone between the limits.',
    fr: 'La bande de garde de {guard} {unit} ne laisse aucune zone d’acceptation entre les limites.',
  },
  'attribute-conforming': { en: 'Conforming.', fr: 'Conforme.' },
  'attribute-nonconforming': { en: 'Nonconforming.', fr: 'Non conforme.' },
  'attribute-not-inspected': { en: 'Not inspected: {reason}', fr: 'Non contrôlé : {reason}' },
  'process-inside': { en: '{value} {unit} is inside its window.', fr: '{value} {unit} est dans sa fenêtre.' },
  'process-outside': {
    en: '{value} {unit} is outside its window: the inspection is void.',
    fr: '{value} {unit} est hors de sa fenêtre : le contrôle est nul.',
  },
  'process-voids': {
    en: 'Not judged: process value {numbers} is outside its window.',
    fr: 'Non jugé : la valeur de procédé {numbers} est hors de sa fenêtre.',
  },
};
