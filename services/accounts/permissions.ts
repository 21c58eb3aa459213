import type { Role } from '@/services/contracts/common';

interface Permission {
  readonly roles: readonly Role[];
  /** Needs release authority on top of the role. */
  readonly releaseAuthority?: true;
  readonly sentence: string;
}

const staff = ['inspector', 'reviewer', 'administrator'] as const;
const readers = ['inspector', 'reviewer', 'administrator', 'auditor'] as const;
const everyone = ['inspector', 'reviewer', 'administrator', 'auditor', 'customer-quality'] as const;

/** Who may call what. Qualification in date is another question, asked when signing. */
export const permissions = {
  'own-account': { roles: everyone, sentence: 'Everyone sees and keeps their own account.' },
  'see-today': { roles: everyone, sentence: 'Everyone sees what waits for them.' },
  evaluate: { roles: staff, sentence: 'Staff may ask the engine; nothing is stored.' },
  'see-plans': { roles: readers, sentence: 'Staff and auditors read drawings, plan issues and techniques.' },
  'prepare-plans': {
    roles: ['reviewer', 'administrator'],
    sentence: 'Reviewers and administrators prepare drawings and plan issues.',
  },
  'approve-plans': {
    roles: ['reviewer'],
    sentence: 'Reviewers check and approve plan issues and techniques, never their own work.',
  },
  'prepare-techniques': {
    roles: ['reviewer', 'administrator'],
    sentence: 'Reviewers and administrators write techniques; a level 3 of the method approves them.',
  },
  'see-parts': { roles: readers, sentence: 'Staff and auditors find parts and lots.' },
  'enter-parts': {
    roles: ['reviewer', 'administrator'],
    sentence: 'Administrators and reviewers enter lots, serials and orders.',
  },
  inspect: {
    roles: ['inspector', 'reviewer'],
    sentence: 'Inspectors and reviewers record and sign inspections where they are authorised.',
  },
  'keep-workstations': {
    roles: ['administrator'],
    sentence: 'Administrators register workstations and issue badges.',
  },
  'see-workstations': { roles: readers, sentence: 'Staff and auditors see the registered workstations.' },
  'see-inspections': { roles: readers, sentence: 'Staff and auditors read inspections and their evidence.' },
  'see-evidence': {
    roles: everyone,
    sentence: 'Evidence is shown to staff, auditors within their engagement, and customers as their order entitles.',
  },
  'see-findings': { roles: readers, sentence: 'Staff and auditors read findings.' },
  disposition: { roles: ['reviewer'], sentence: 'Reviewers decide findings, never on their own inspection.' },
  'raise-hold': { roles: staff, sentence: 'Staff place holds.' },
  'lift-hold': { roles: ['reviewer'], sentence: 'Reviewers lift holds.' },
  'see-shipments': { roles: readers, sentence: 'Staff and auditors see shipments and their gates.' },
  'gather-shipment': {
    roles: ['reviewer', 'administrator'],
    sentence: 'Reviewers and administrators gather serials for an order line.',
  },
  'sign-release': {
    roles: ['reviewer'],
    releaseAuthority: true,
    sentence: 'A reviewer with release authority signs, never for a serial they evaluated or dispositioned.',
  },
  'see-jobs': { roles: readers, sentence: 'Staff and auditors see how far work after a change has come.' },
  'see-certificates': { roles: everyone, sentence: 'Staff and auditors see certificates; a customer sees their own.' },
  'acknowledge-certificate': { roles: ['customer-quality'], sentence: 'The customer acknowledges what arrived.' },
  'withdraw-certificate': {
    roles: ['reviewer'],
    releaseAuthority: true,
    sentence: 'A reviewer with release authority withdraws a certificate.',
  },
  'see-trace': { roles: readers, sentence: 'Staff and auditors trace a serial or lot.' },
  'see-record': {
    roles: ['auditor', 'administrator', 'reviewer'],
    sentence: 'Auditors, administrators and reviewers read the journal.',
  },
  'see-equipment': { roles: readers, sentence: 'Staff and auditors see equipment, calibrations and checks.' },
  'keep-equipment': {
    roles: ['reviewer', 'administrator'],
    sentence: 'Reviewers and administrators keep equipment and calibrations.',
  },
  'record-checks': { roles: ['inspector', 'reviewer'], sentence: 'Inspectors and reviewers record process checks.' },
  'close-suspects': {
    roles: ['reviewer'],
    sentence: 'Reviewers close groups of a suspect list, never over their own inspections.',
  },
  'see-personnel': { roles: readers, sentence: 'Staff and auditors see authorisations.' },
  'prepare-personnel': {
    roles: ['administrator', 'reviewer'],
    sentence: 'Administrators prepare authorisations and vision records.',
  },
  'record-vision': { roles: ['administrator'], sentence: 'Administrators record vision tests.' },
  'approve-personnel': { roles: ['reviewer'], sentence: 'Reviewers approve authorisations in their method, never their own.' },
  'keep-accounts': { roles: ['administrator'], sentence: 'Administrators keep accounts and customers.' },
  'keep-orders': { roles: ['administrator', 'reviewer'], sentence: 'Administrators and reviewers keep customers and orders.' },
  'see-orders': { roles: readers, sentence: 'Staff and auditors see customers and orders.' },
} as const satisfies Record<string, Permission>;

export type PermissionName = keyof typeof permissions;

/** May a person of this role, with or without release authority, do it? */
export function may(person: { readonly role: Role; readonly releaseAuthority: boolean }, name: PermissionName): boolean {
  const permission: Permission = permissions[name];
  return permission.roles.includes(person.role) && (permission.releaseAuthority !== true || person.releaseAuthority);
}
