/** What the customer's quality contact gets: a link and nothing confidential. */
export interface CertificateMail {
  readonly subject: string;
  readonly text: string;
  readonly html: string;
}

const words = {
  en: {
    subject: (number: string) => `Certificate of conformance ${number} is ready`,
    opening: 'A certificate of conformance has been issued for your order.',
    link: 'Sign in to read, download and acknowledge it:',
    closing:
      'A certificate of conformance is not an airworthiness release. This message was sent by the foundry’s record system; please do not answer it.',
  },
  fr: {
    subject: (number: string) => `Le certificat de conformité ${number} est disponible`,
    opening: 'Un certificat de conformité a été établi pour votre commande.',
    link: 'Connectez-vous pour le lire, le télécharger et en accuser réception :',
    closing:
      'Un certificat de conformité n’est pas une autorisation de mise en service. Ce message vient du registre de la fonderie ; merci de ne pas y répondre.',
  },
} as const;

function escaped(text: string): string {
  return text.replaceAll('&', '&amp;').replaceAll('<', '&lt;').replaceAll('>', '&gt;').replaceAll('"', '&quot;');
}

/** The mail about an issued certificate, plain and HTML, in the customer's language. */
export function certificateMail(
  locale: 'en' | 'fr',
  about: { readonly number: string; readonly address: string; readonly plant: string },
): CertificateMail {
  const { subject, opening, link, closing } = words[locale];
  const address = `${about.address}/certificates/${encodeURIComponent(about.number)}`;
  return {
    subject: subject(about.number),
    text: [about.plant, '', opening, link, address, '', closing, ''].join('\n'),
    html: `<!doctype html><html lang="${locale}"><body><p><strong>${escaped(about.plant)}</strong></p><p>${escaped(opening)}</p><p>${escaped(link)}<br><a href="${escaped(address)}">${escaped(address)}</a></p><p>${escaped(closing)}</p></body></html>`,
  };
}
