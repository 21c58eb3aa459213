import type { LineProfile } from '@/services/engine/methods/radiography/duplex-pairs';

/** The same noise every time: a linear congruential generator, twelve draws to a nearly Gaussian one. */
export function noiseFrom(seed: number): () => number {
  let state = seed >>> 0;
  return () => {
    let sum = -6;
    for (let draw = 0; draw < 12; draw += 1) {
      state = (Math.imul(state, 1664525) + 1013904223) >>> 0;
      sum += state / 2 ** 32;
    }
    return sum;
  };
}

const WIRES_MM = [0.8, 0.63, 0.5, 0.4, 0.32, 0.25, 0.2, 0.16, 0.13, 0.1, 0.08, 0.063, 0.05];

export interface GaugeInBeam {
  readonly blurSigmaMm: number;
  readonly stepMm: number;
  /** Ground over standard deviation of the averaged line. */
  readonly signalToNoise: number;
  readonly seed?: number;
  /** Attenuation of the wires for each mm. */
  readonly attenuation?: number;
  /** Rise of the ground over the whole line, as a share. */
  readonly slope?: number;
  readonly pairs?: number;
  /** Fall of the ground towards both ends, as a share: the heel of the beam. */
  readonly curve?: number;
}

/**
 * A duplex gauge in a beam: round wires that absorb exponentially along their chords, blurred by a Gaussian, with noise. Made
 * with the platform's exp, apart from the code it judges.
 */
export function gaugeProfile(beam: GaugeInBeam): LineProfile {
  const fine = 0.005;
  const wires = WIRES_MM.slice(0, beam.pairs ?? 13);
  const centres: [number, number][] = [];
  let at = 4;
  for (const wire of wires) {
    centres.push([at + wire / 2, wire / 2], [at + 2.5 * wire, wire / 2]);
    at += 3 * wire + 2;
  }
  const length = Math.round((at + 2) / fine);
  const passed = Array.from({ length }, (_, n) => {
    const chord = centres.reduce((sum, [centre, radius]) => {
      const off = n * fine - centre;
      return Math.abs(off) < radius ? sum + 2 * Math.sqrt(radius * radius - off * off) : sum;
    }, 0);
    return Math.exp(-(beam.attenuation ?? 2) * chord);
  });
  const reach = Math.ceil((4 * beam.blurSigmaMm) / fine);
  const kernel = Array.from({ length: 2 * reach + 1 }, (_, n) => Math.exp(-0.5 * (((n - reach) * fine) / beam.blurSigmaMm) ** 2));
  const total = kernel.reduce((sum, weight) => sum + weight, 0);
  const noise = noiseFrom(beam.seed ?? 1);
  const ground = 20_000;
  const values: number[] = [];
  for (let place = 0; place * beam.stepMm < length * fine; place += 1) {
    const middle = Math.round((place * beam.stepMm) / fine);
    const blurred = kernel.reduce((sum, weight, n) => sum + weight * (passed[middle + n - reach] ?? 1), 0) / total;
    const along = (place * beam.stepMm) / (length * fine);
    const share = 1 + (beam.slope ?? 0) * along - (beam.curve ?? 0) * (2 * along - 1) ** 2;
    values.push(ground * (blurred * share + noise() / beam.signalToNoise));
  }
  return { values, stepMm: beam.stepMm, wires: 'darker' };
}
