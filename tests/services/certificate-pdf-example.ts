import type { CertificateRecord } from '@/services/pdf/certificate-record';
import { certificateSentences } from '@/services/pdf/certificate-words';

const operations = [
  ['0310', 'Grain etch and visual inspection of the casting', 'visual', 'HVC-TS-114', 'VT-03 iss. 4'],
  ['0340', 'Fluorescent penetrant inspection, final', 'penetrant', 'ASTM E1417/E1417M', 'PT-12 iss. 7'],
  ['0360', 'Digital radiography, aerofoil and root', 'radiography', 'ASTM E2699 / E1742', 'RT-08 iss. 5'],
  ['0380', 'Wall thickness, ultrasonic, 24 stations', 'ultrasonic-thickness', 'EN ISO 16809', 'UT-02 iss. 3'],
  ['0400', 'Dimensional inspection, ⌀ and chord', 'dimensional', 'Drawing 7741-2', 'CMM-21 iss. 2'],
  ['0420', 'Cooling airflow against master', 'airflow', 'HVC-TS-131', 'AF-01 iss. 6'],
] as const;

/** A release of made-up turbine blades; the serials, readings and numbers are generated, nothing in it is real. */
export function exampleRecord(wish: { serials: number; locale?: 'en' | 'fr'; number?: string }): CertificateRecord {
  const locale = wish.locale ?? 'en';
  const number = wish.number ?? 'COC-2026-000417';
  const checkCode = 'K7QF-93MX-2TVB';
  return {
    kind: 'certificate-of-conformance',
    schemaVersion: 1,
    number,
    checkCode,
    replaces: null,
    issuedAt: '2026-03-09T12:00:00Z',
    timeZone: 'Europe/Paris',
    locale,
    plant: { name: 'Harrow Vale Castings', address: ['Foundry Lane 12', 'Harrow Vale HV4 1RN'] },
    customer: { name: 'Société Aube Turbines', address: ['14, rue de l’Œuvre', '59000 Lille', 'France'] },
    order: { number: 'SO-20418', purchaseOrder: 'AT-4500098113', line: '30' },
    part: { number: '7741-2-003', title: 'Blade, high-pressure turbine, stage 1, hollow' },
    drawing: { number: '7741-2', revision: 'H' },
    planIssue: '7741-2-003 / 6',
    quantity: wish.serials,
    serials: Array.from({ length: wish.serials }, (_, index) => exampleSerial(index)),
    type31: true,
    ...certificateSentences(locale),
    signatory: { name: 'Zoë Łukasik', function: 'Release authority, quality', signedAt: '2026-03-09T11:58:20Z' },
    place: 'Harrow Vale',
    verifyUrl: `https://certificates.example.com/verify?number=${number}&check=${checkCode}`,
    timeStamp: 'none',
    clauses: [
      { code: 'Q-07', text: 'Certificate to state heat, serial and position on the cluster of each part.' },
      { code: 'Q-22', text: 'Fluorescent penetrant inspection after the final machining, level 3 sensitivity or better.' },
    ],
  };
}

function exampleSerial(index: number): CertificateRecord['serials'][number] {
  const conceded = index === 2;
  return {
    serial: `HV7B-${String(10_050 + index)}`,
    heat: `H26-0${118 + Math.floor(index / 16)}`,
    cluster: `CL-${String(3071 + Math.floor(index / 8))}`,
    position: String((index % 8) + 1),
    inspections: operations.map(([operation, title, method, standard, technique], at) => ({
      operation,
      title,
      method,
      standard,
      technique,
      inspectionNumber: `IN-26-${String(4000 + index * operations.length + at).padStart(6, '0')}`,
      result: conceded && operation === '0380' ? 'accept-by-concession' : 'accept',
      signedAt: '2026-03-06T09:14:00Z',
    })),
    concessions: conceded
      ? [
          {
            number: 'CN-26-0031',
            requirement: 'Wall at station 17',
            limits: '0.78 mm ≤ wall < 0.80 mm',
            customerReference: 'AT-DER-2208',
          },
        ]
      : [],
    values: [
      {
        operation: '0380',
        label: 'Wall, least',
        value: conceded ? '0.786' : '0.842',
        unit: 'mm',
        lower: '0.800',
        upper: '1.100',
      },
      { operation: '0420', label: 'Flow', value: '101.2', unit: '% of master', lower: '97.0', upper: '103.0' },
    ],
  };
}
