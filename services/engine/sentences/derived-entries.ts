import type { SentenceCatalogue } from './sentence';

/** Why raw entries of a derived quantity cannot be taken, or a plan's entry for one not be approved. */
export const derivedEntrySentences = {
  'quantity-unknown': { en: '{quantity} is not a derived quantity.', fr: '{quantity} n’est pas une grandeur dérivée.' },
  'input-unknown': { en: '{input} is not an input of {quantity}.', fr: '{input} n’est pas une entrée de {quantity}.' },
  'input-twice': { en: '{input} is given twice.', fr: '{input} est donné deux fois.' },
  'input-fixed': { en: '{input} is fixed by the plan.', fr: '{input} est fixé par la gamme.' },
  'input-missing': { en: '{input} is missing.', fr: '{input} manque.' },
  'unit-of-other-quantity': { en: '{input} needs a unit of {quantity}.', fr: '{input} demande une unité de {quantity}.' },
  'unit-not-wanted': { en: '{input} has no unit.', fr: '{input} n’a pas d’unité.' },
  'not-a-decimal': { en: '{input} must be a decimal.', fr: '{input} doit être un nombre décimal.' },
  'not-a-count': { en: '{input} must be a whole number.', fr: '{input} doit être un nombre entier.' },
  'not-a-choice': { en: '{input} must be one of {choices}.', fr: '{input} doit être l’un de {choices}.' },
  'mark-missing': {
    en: '{input} must be filled in, up to 60 characters.',
    fr: '{input} doit être rempli, 60 caractères au plus.',
  },
  'one-value-wanted': { en: '{input} takes one value, not a list.', fr: '{input} prend une valeur, non une liste.' },
  'list-wanted': { en: '{input} takes a list of values.', fr: '{input} prend une liste de valeurs.' },
  'too-few-values': { en: '{input} needs at least {needed} values.', fr: '{input} demande au moins {needed} valeurs.' },
  'too-many-values': { en: '{input} takes at most {most} values.', fr: '{input} prend au plus {most} valeurs.' },
  'lists-of-different-length': {
    en: 'Lists that belong together must have as many values as each other.',
    fr: 'Les listes qui vont ensemble doivent avoir autant de valeurs.',
  },
  'not-above-zero': { en: '{input} must be above 0, not {value}.', fr: '{input} doit dépasser 0, non {value}.' },
  'below-zero': { en: '{input} must not be below 0, as {value} is.', fr: '{input} ne doit pas être sous 0 comme {value}.' },
  'no-values': { en: 'There is no value to compute from.', fr: 'Il n’y a pas de valeur à calculer.' },
  'nothing-counted': { en: 'Nothing was counted.', fr: 'Rien n’a été compté.' },
  'not-in-table': { en: 'The table does not hold this.', fr: 'Le tableau ne contient pas cela.' },
  'beyond-table': { en: 'This is beyond what can be computed.', fr: 'Cela dépasse ce qui peut être calculé.' },
  'result-too-large': {
    en: 'The result of {quantity} has more digits than can be recorded.',
    fr: 'Le résultat de {quantity} a plus de chiffres qu’on n’en peut consigner.',
  },
  'limits-crossed': { en: 'The lower limit is above the upper.', fr: 'La limite inférieure dépasse la supérieure.' },
} as const satisfies SentenceCatalogue;
