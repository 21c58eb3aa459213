import { defineMessages } from '@/components/theme/define-messages';

export const messages = defineMessages({
  en: {
    title: 'Today',
    greeting: 'Good work, {name}',
    findings: 'Findings that wait for judgement: {count}',
    shipments: 'Shipments not yet released: {count}',
    certificates: 'Certificates not yet acknowledged: {count}',
    parts: 'Parts in work: {count}',
    trace: 'Follow a serial',
  },
  fr: {
    title: 'Aujourd’hui',
    greeting: 'Bon travail, {name}',
    findings: 'Constats qui attendent un jugement : {count}',
    shipments: 'Expéditions pas encore libérées : {count}',
    certificates: 'Certificats sans accusé de réception : {count}',
    parts: 'Pièces en cours : {count}',
    trace: 'Suivre un numéro de série',
  },
});
