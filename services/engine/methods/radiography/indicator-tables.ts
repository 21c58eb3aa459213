/** Wires W1 to W19 of ISO 19232-1 in mm (W17 to W19 from memory); set n has seven wires from its first one. */
export const ISO_WIRES_MM: readonly string[] = [
  '3.20',
  '2.50',
  '2.00',
  '1.60',
  '1.25',
  '1.00',
  '0.80',
  '0.63',
  '0.50',
  '0.40',
  '0.32',
  '0.25',
  '0.20',
  '0.16',
  '0.125',
  '0.10',
  '0.080',
  '0.063',
  '0.050',
];

/** First wires of the four sets of ISO 19232-1; each set has seven wires. */
export const ISO_WIRE_SETS: readonly number[] = [1, 6, 10, 13];

/** Holes H1 to H18 of ISO 19232-2 in mm, hole diameter = step thickness (from memory). Steps below 0.8 mm have two holes. */
export const ISO_HOLES_MM: readonly string[] = [
  '0.125',
  '0.160',
  '0.200',
  '0.250',
  '0.320',
  '0.400',
  '0.500',
  '0.630',
  '0.800',
  '1.000',
  '1.250',
  '1.600',
  '2.000',
  '2.500',
  '3.200',
  '4.000',
  '5.000',
  '6.300',
];

/** First holes of the four step-hole indicators of ISO 19232-2; each has six steps. */
export const ISO_HOLE_SETS: readonly number[] = [1, 5, 9, 13];

/** Wire identities 1 to 21 of ASTM E747 in inch. */
export const ASTM_WIRES_IN: readonly string[] = [
  '0.0032',
  '0.0040',
  '0.0050',
  '0.0063',
  '0.0080',
  '0.0100',
  '0.0130',
  '0.0160',
  '0.0200',
  '0.0250',
  '0.0320',
  '0.0400',
  '0.0500',
  '0.0630',
  '0.0800',
  '0.1000',
  '0.1260',
  '0.1600',
  '0.2000',
  '0.2500',
  '0.3200',
];

/** Sets A to D of ASTM E747: first identity; each has six wires, the last of one the first of the next. */
export const ASTM_WIRE_SETS: Readonly<Record<'A' | 'B' | 'C' | 'D', number>> = { A: 1, B: 6, C: 11, D: 16 };

/** Plaque numbers of ASTM E1025, thickness in thousandths of an inch. */
export const ASTM_PLAQUES: readonly number[] = [5, 7, 10, 12, 15, 17, 20, 25, 30, 35, 40, 45, 50, 60, 80, 100];

/** Wire pairs D1 to D13 of ISO 19232-5 in mm: wire diameter, and gap between the two. */
export const DUPLEX_WIRES_MM: readonly string[] = [
  '0.80',
  '0.63',
  '0.50',
  '0.40',
  '0.32',
  '0.25',
  '0.20',
  '0.16',
  '0.13',
  '0.10',
  '0.08',
  '0.063',
  '0.05',
];
