import { defineMessages } from '@/components/theme/define-messages';

export const messages = defineMessages({
  en: {
    optional: '(optional)',
    choose: 'Choose…',
    show: 'Show',
    hide: 'Hide',
    required: 'Needed here.',
    notADecimal: 'Write one number, with at most one comma or point: 1.25 or 1,25.',
    notADay: 'Write the day with the year first: 2026-03-09.',
    dayForm: 'year-month-day',
    attention: '{count, plural, one {One field needs attention.} other {{count} fields need attention.}}',
  },
  fr: {
    optional: '(facultatif)',
    choose: 'Choisir…',
    show: 'Afficher',
    hide: 'Masquer',
    required: 'À renseigner.',
    notADecimal: 'Écrivez un seul nombre, avec au plus une virgule ou un point : 1,25 ou 1.25.',
    notADay: 'Écrivez le jour en commençant par l’année : 2026-03-09.',
    dayForm: 'année-mois-jour',
    attention: '{count, plural, one {Un champ est à corriger.} other {{count} champs sont à corriger.}}',
  },
});
