import { defineMessages } from '@/components/theme/define-messages';

export const messages = defineMessages({
  en: {
    title: 'Check a certificate',
    lead: 'By the number and check code printed on it, or by the file itself.',
    number: 'Certificate number',
    check: 'Check code',
    ask: 'Check number',
    file: 'Certificate file (PDF)',
    fileHint: 'Your browser sends the file’s digest first. The file itself is sent only when the digest is not known.',
    answer: {
      valid: 'Valid: this certificate was issued here and stands.',
      'valid-except': 'Valid, except for withdrawn serials.',
      superseded: 'Superseded by another certificate.',
      withdrawn: 'Withdrawn: do not rely on it.',
      altered: 'Altered: these are not the bytes that were issued.',
      unknown: 'Unknown: no such certificate, or the check code is wrong.',
    },
    details: 'Certificate {number}, {partNumber}, quantity {quantity}',
    serials: 'Withdrawn serials: {serials}',
  },
  fr: {
    title: 'Vérifier un certificat',
    lead: 'Par le numéro et le code imprimés, ou par le fichier lui-même.',
    number: 'Numéro de certificat',
    check: 'Code de contrôle',
    ask: 'Vérifier le numéro',
    file: 'Fichier du certificat (PDF)',
    fileHint: 'Le navigateur envoie d’abord l’empreinte du fichier. Le fichier n’est envoyé que si l’empreinte est inconnue.',
    answer: {
      valid: 'Valable : ce certificat a été établi ici et reste en vigueur.',
      'valid-except': 'Valable, sauf pour les séries retirées.',
      superseded: 'Remplacé par un autre certificat.',
      withdrawn: 'Retiré : ne vous y fiez pas.',
      altered: 'Altéré : ce ne sont pas les octets établis.',
      unknown: 'Inconnu : aucun certificat de ce numéro, ou code de contrôle faux.',
    },
    details: 'Certificat {number}, {partNumber}, quantité {quantity}',
    serials: 'Séries retirées : {serials}',
  },
});
