import type { SentenceCatalogue } from './sentence';

/** Sentences about rules for indications: one for each kind kept and broken. */
export const indicationSentences: SentenceCatalogue = {
  'indication-rule-waits': {
    en: 'Zone {zone} cannot be judged: an indication without place, size or comparable level could break the rule.',
    fr: 'La zone {zone} ne peut être jugée : une indication sans position, taille ou niveau comparable pourrait enfreindre la règle.',
  },
  'indication-rule-without-method': {
    en: 'Not judged: none of {methods} was carried out.',
    fr: 'Non jugé : aucune des méthodes {methods} n’a été exécutée.',
  },
  'indication-rule-void': {
    en: 'Not judged: a process value is outside its window.',
    fr: 'Non jugé : une valeur de procédé est hors de sa fenêtre.',
  },
  'indication-rule-broken-already': {
    en: 'Zone {zone}: what is known already breaks the rule (indications {indications}).',
    fr: 'Zone {zone} : ce qui est connu enfreint déjà la règle (indications {indications}).',
  },
  'indication-crack-kept': { en: 'No crack in zone {zone}.', fr: 'Pas de fissure dans la zone {zone}.' },
  'indication-crack-broken': {
    en: 'Crack in zone {zone}: indications {indications}.',
    fr: 'Fissure dans la zone {zone} : indications {indications}.',
  },
  'indication-not-allowed-kept': {
    en: 'Nothing in zone {zone} that is not allowed.',
    fr: 'Rien d’interdit dans la zone {zone}.',
  },
  'indication-not-allowed-broken': {
    en: 'Not allowed in zone {zone}: {measured} (indications {indications}).',
    fr: 'Interdit dans la zone {zone} : {measured} (indications {indications}).',
  },
  'indication-max-size-kept': {
    en: 'Nothing in zone {zone} is longer than {limit} {unit}; longest {measured}.',
    fr: 'Rien dans la zone {zone} ne dépasse {limit} {unit} ; le plus long {measured}.',
  },
  'indication-max-size-broken': {
    en: '{measured} {unit} in zone {zone} is longer than {limit} {unit} (indications {indications}).',
    fr: '{measured} {unit} dans la zone {zone} dépasse {limit} {unit} (indications {indications}).',
  },
  'indication-size-bands-kept': {
    en: 'Sizes in zone {zone} keep their bands.',
    fr: 'Les tailles dans la zone {zone} respectent leurs classes.',
  },
  'indication-size-bands-above': {
    en: '{measured} in zone {zone} above the last band of {edge} {unit} (indications {indications}).',
    fr: '{measured} dans la zone {zone} au-dessus de la dernière classe de {edge} {unit} (indications {indications}).',
  },
  'indication-size-bands-each-band': {
    en: '{measured} in zone {zone} in the band up to {edge} {unit}; allowed {limit} (indications {indications}).',
    fr: '{measured} dans la zone {zone} dans la classe jusqu’à {edge} {unit} ; admis {limit} (indications {indications}).',
  },
  'indication-size-bands-this-band-and-above': {
    en: '{measured} in zone {zone} in the band up to {edge} {unit} and above; allowed {limit} (indications {indications}).',
    fr: '{measured} dans la zone {zone} dans la classe jusqu’à {edge} {unit} et au-dessus ; admis {limit} (indications {indications}).',
  },
  'indication-max-count-kept': {
    en: '{measured} in zone {zone}; allowed {limit}.',
    fr: '{measured} dans la zone {zone} ; admis {limit}.',
  },
  'indication-max-count-broken': {
    en: '{measured} in zone {zone} are more than {limit}.',
    fr: '{measured} dans la zone {zone} dépassent {limit}.',
  },
  'indication-max-count-in-window-circle-kept': {
    en: 'At most {measured} within a circle of {size} {unit} in zone {zone}; allowed {limit}.',
    fr: 'Au plus {measured} dans un cercle de {size} {unit} dans la zone {zone} ; admis {limit}.',
  },
  'indication-max-count-in-window-circle-broken': {
    en: '{measured} within a circle of {size} {unit} in zone {zone} are more than {limit} (indications {indications}).',
    fr: '{measured} dans un cercle de {size} {unit} dans la zone {zone} dépassent {limit} (indications {indications}).',
  },
  'indication-max-count-in-window-square-kept': {
    en: 'At most {measured} within a square of {size} {unit} in zone {zone}; allowed {limit}.',
    fr: 'Au plus {measured} dans un carré de {size} {unit} dans la zone {zone} ; admis {limit}.',
  },
  'indication-max-count-in-window-square-broken': {
    en: '{measured} within a square of {size} {unit} in zone {zone} are more than {limit} (indications {indications}).',
    fr: '{measured} dans un carré de {size} {unit} dans la zone {zone} dépassent {limit} (indications {indications}).',
  },
  'indication-min-separation-kept': {
    en: 'Nothing in zone {zone} is nearer than {limit} {unit}; nearest {measured}.',
    fr: 'Rien dans la zone {zone} n’est à moins de {limit} {unit} ; le plus proche {measured}.',
  },
  'indication-min-separation-broken': {
    en: '{measured} {unit} apart in zone {zone} is nearer than {limit} {unit} (indications {indications}).',
    fr: '{measured} {unit} d’écart dans la zone {zone} est moins que {limit} {unit} (indications {indications}).',
  },
  'indication-max-total-length-kept': {
    en: 'Lengths in zone {zone} add up to {measured} {unit}; allowed {limit} {unit}.',
    fr: 'Longueur cumulée dans la zone {zone} : {measured} {unit} ; admis {limit} {unit}.',
  },
  'indication-max-total-length-broken': {
    en: 'Lengths in zone {zone} add up to {measured} {unit}, more than {limit} {unit}.',
    fr: 'Longueur cumulée dans la zone {zone} : {measured} {unit}, plus que {limit} {unit}.',
  },
  'indication-max-total-area-kept': {
    en: 'Areas in zone {zone} add up to {measured} {unit}²; allowed {limit} {unit}².',
    fr: 'Aire cumulée dans la zone {zone} : {measured} {unit}² ; admis {limit} {unit}².',
  },
  'indication-max-total-area-broken': {
    en: 'Areas in zone {zone} add up to {measured} {unit}², more than {limit} {unit}².',
    fr: 'Aire cumulée dans la zone {zone} : {measured} {unit}², plus que {limit} {unit}².',
  },
  ...windowTotals('length', 'circle', 'Lengths', 'Longueur cumulée', 'cercle', '{unit}'),
  ...windowTotals('length', 'square', 'Lengths', 'Longueur cumulée', 'carré', '{unit}'),
  ...windowTotals('area', 'circle', 'Areas', 'Aire cumulée', 'cercle', '{unit}²'),
  ...windowTotals('area', 'square', 'Areas', 'Aire cumulée', 'carré', '{unit}²'),
  'indication-alignment-kept': {
    en: 'No line of {limit} in zone {zone}; longest {measured}.',
    fr: 'Pas d’alignement de {limit} dans la zone {zone} ; le plus long {measured}.',
  },
  'indication-alignment-broken': {
    en: '{measured} in line in zone {zone}; {limit} are a line (indications {indications}).',
    fr: '{measured} alignées dans la zone {zone} ; {limit} font un alignement (indications {indications}).',
  },
  'indication-max-severity-kept': {
    en: 'Severity in zone {zone} is not above {limit}; highest {measured}.',
    fr: 'La sévérité dans la zone {zone} ne dépasse pas {limit} ; la plus haute {measured}.',
  },
  'indication-max-severity-broken': {
    en: 'Severity {measured} in zone {zone} is above {limit} (indications {indications}).',
    fr: 'La sévérité {measured} dans la zone {zone} dépasse {limit} (indications {indications}).',
  },
};

function windowTotals(
  kind: string,
  shape: string,
  english: string,
  french: string,
  frenchShape: string,
  unit: string,
): SentenceCatalogue {
  return {
    [`indication-max-total-${kind}-${shape}-kept`]: {
      en: `${english} within a ${shape} of {size} {unit} in zone {zone} add up to at most {measured} ${unit}; allowed {limit} ${unit}.`,
      fr: `${french} dans un ${frenchShape} de {size} {unit} dans la zone {zone} : au plus {measured} ${unit} ; admis {limit} ${unit}.`,
    },
    [`indication-max-total-${kind}-${shape}-broken`]: {
      en: `${english} within a ${shape} of {size} {unit} in zone {zone} add up to {measured} ${unit}, more than {limit} ${unit} (indications {indications}).`,
      fr: `${french} dans un ${frenchShape} de {size} {unit} dans la zone {zone} : {measured} ${unit}, plus que {limit} ${unit} (indications {indications}).`,
    },
  };
}
