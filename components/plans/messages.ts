import { defineMessages } from '@/components/theme/define-messages';
import { english } from './messages-en';
import { french } from './messages-fr';

export const messages = defineMessages({ en: english, fr: french });
