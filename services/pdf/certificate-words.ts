import type { CertificateInspection, CertificateRecord } from './certificate-record';

type Locale = CertificateRecord['locale'];

const en = {
  title: 'Certificate of conformance',
  type31: 'Inspection certificate 3.1 according to EN 10204',
  form: 'Supplier’s declaration of conformity, contents after ISO/IEC 17050-1',
  number: 'Certificate number',
  replaces: 'Replaces certificate',
  issuer: 'Issued by',
  customer: 'Customer',
  order: 'Order',
  purchaseOrder: 'Purchase order',
  orderLine: 'Line',
  orderNumber: 'Our order',
  part: 'Part',
  drawing: 'Drawing',
  revision: 'Revision',
  planIssue: 'Plan issue',
  quantity: 'Quantity',
  statement: 'Statement of conformity',
  signatory: 'Signed for the issuer by',
  placeAndDate: 'Place and date of issue',
  signedAt: 'Release signed',
  seal: 'Electronic seal',
  sealText: 'Sealed with the plant’s key (PAdES, SHA-256). The release record is attached to this file.',
  noTimeStamp: 'No time stamp: the time is the issuer’s own, not that of a time-stamping authority.',
  timeStamp: 'With the time stamp of a time-stamping authority (RFC 3161).',
  check: 'Check this certificate',
  checkCode: 'Check code',
  clauses: 'Clauses of the order',
  inspections: 'Inspections made',
  operation: 'Op.',
  inspection: 'Inspection',
  standardAndTechnique: 'Standard · technique',
  serials: 'Serials',
  serialsCount: 'serials',
  heat: 'Heat',
  cluster: 'Cluster',
  position: 'position',
  concession: 'Concession',
  reference: 'reference',
  caution: 'Caution',
  page: 'Page',
  of: 'of',
  continued: 'continued',
  recordDigest: 'Record SHA-256',
  method: 'Method',
  notStated: 'not stated',
};

const fr: typeof en = {
  title: 'Certificat de conformité',
  type31: 'Certificat de réception 3.1 selon EN 10204',
  form: 'Déclaration de conformité du fournisseur, contenu d’après ISO/CEI 17050-1',
  number: 'Numéro du certificat',
  replaces: 'Remplace le certificat',
  issuer: 'Émis par',
  customer: 'Client',
  order: 'Commande',
  purchaseOrder: 'Commande client',
  orderLine: 'Poste',
  orderNumber: 'Notre commande',
  part: 'Pièce',
  drawing: 'Plan',
  revision: 'Indice',
  planIssue: 'Édition du plan de contrôle',
  quantity: 'Quantité',
  statement: 'Déclaration de conformité',
  signatory: 'Signé pour l’émetteur par',
  placeAndDate: 'Lieu et date d’émission',
  signedAt: 'Libération signée',
  seal: 'Cachet électronique',
  sealText: 'Scellé avec la clé de l’usine (PAdES, SHA-256). L’enregistrement de libération est joint à ce fichier.',
  noTimeStamp: 'Sans horodatage : l’heure est celle de l’émetteur, non celle d’une autorité d’horodatage.',
  timeStamp: 'Avec l’horodatage d’une autorité d’horodatage (RFC 3161).',
  check: 'Vérifier ce certificat',
  checkCode: 'Code de contrôle',
  clauses: 'Clauses de la commande',
  inspections: 'Contrôles effectués',
  operation: 'Op.',
  inspection: 'Contrôle',
  standardAndTechnique: 'Norme · technique',
  serials: 'Numéros de série',
  serialsCount: 'numéros de série',
  heat: 'Coulée',
  cluster: 'Grappe',
  position: 'position',
  concession: 'Dérogation',
  reference: 'référence',
  caution: 'Attention',
  page: 'Page',
  of: 'sur',
  continued: 'suite',
  recordDigest: 'SHA-256 de l’enregistrement',
  method: 'Méthode',
  notStated: 'non indiqué',
};

const results: Record<Locale, Record<CertificateInspection['result'], string>> = {
  en: {
    accept: 'accepted',
    'accept-by-concession': 'accepted by concession',
    'met-by-sample': 'met by sample',
    'met-by-ancestor': 'met by lot',
    'met-by-outside-certificate': 'met by outside certificate',
    waived: 'waived by the order',
  },
  fr: {
    accept: 'accepté',
    'accept-by-concession': 'accepté par dérogation',
    'met-by-sample': 'satisfait par échantillon',
    'met-by-ancestor': 'satisfait par lot',
    'met-by-outside-certificate': 'satisfait par certificat externe',
    waived: 'dispensé par la commande',
  },
};

/** The fixed words of the paper in the order's language. */
export function certificateWords(locale: Locale): typeof en {
  return locale === 'fr' ? fr : en;
}

/** How a result is said on the paper. */
export function resultInWords(locale: Locale, result: CertificateInspection['result']): string {
  return results[locale][result];
}

/**
 * The sentences a release proposes; the signer sees them and the record keeps them as shown.
 * The caution follows 14 CFR 21 and EU 748/2012 in substance: only the holder of an approval issues an airworthiness release.
 */
export function certificateSentences(locale: Locale): { statement: string; caution: string } {
  if (locale === 'fr') {
    return {
      statement:
        'Nous déclarons sous notre seule responsabilité que les pièces dont les numéros de série figurent sur ce certificat ont été fabriquées et contrôlées conformément au plan, à l’indice et à la commande cités, et qu’elles y sont conformes, sous réserve des dérogations indiquées par numéro de série.',
      caution:
        'Ce certificat de conformité n’est pas un certificat libératoire autorisé ni une autorisation de remise en service : celle-ci n’est délivrée que par l’organisme titulaire de l’agrément, selon les règles de son autorité. Le plan et la commande font foi.',
    };
  }
  return {
    statement:
      'We declare under our sole responsibility that the parts whose serials are listed on this certificate were made and inspected in accordance with the drawing, revision and purchase order named, and that they conform to them, subject to the concessions stated per serial.',
    caution:
      'This certificate of conformance is not an airworthiness release; that is issued only by the organisation that holds the approval, under its authority’s rules. The drawing and the purchase order govern.',
  };
}
