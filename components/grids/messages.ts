import { defineMessages } from '@/components/theme/define-messages';

export const messages = defineMessages({
  en: { loading: 'Fetching…', none: 'Nothing here', again: 'Try again', sortable: 'Press Enter to sort' },
  fr: { loading: 'Chargement…', none: 'Rien ici', again: 'Réessayer', sortable: 'Entrée pour trier' },
});
