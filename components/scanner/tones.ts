'use client';

/** What a scan can come to; each has its own tone, and its word on the page for whoever cannot hear it. */
export type Tone = 'added' | 'again' | 'unknown' | 'wrong';

interface Note {
  readonly hz: number;
  readonly ms: number;
  readonly pauseMs?: number;
}

/** Told apart by rhythm as well as pitch: one short high, two short, two long low, one long rough. */
const notes: Readonly<Record<Tone, { readonly form: OscillatorType; readonly notes: readonly Note[] }>> = {
  added: { form: 'sine', notes: [{ hz: 1320, ms: 90 }] },
  again: {
    form: 'sine',
    notes: [
      { hz: 990, ms: 60, pauseMs: 50 },
      { hz: 990, ms: 60 },
    ],
  },
  unknown: {
    form: 'triangle',
    notes: [
      { hz: 330, ms: 180, pauseMs: 70 },
      { hz: 262, ms: 260 },
    ],
  },
  wrong: { form: 'square', notes: [{ hz: 165, ms: 600 }] },
};

let sound: AudioContext | undefined;

/** Plays the tone of an outcome; silent where the browser has no sound or has not been touched yet. */
export function playTone(tone: Tone): void {
  if (typeof AudioContext === 'undefined') return;
  sound ??= new AudioContext();
  if (sound.state === 'suspended') void sound.resume();
  let at = sound.currentTime + 0.01;
  const { form, notes: played } = notes[tone];
  for (const { hz, ms, pauseMs = 0 } of played) {
    const [oscillator, volume] = [sound.createOscillator(), sound.createGain()];
    oscillator.type = form;
    oscillator.frequency.value = hz;
    // Ramps, because a tone cut off hard clicks.
    volume.gain.setValueAtTime(0, at);
    volume.gain.linearRampToValueAtTime(0.25, at + 0.008);
    volume.gain.setValueAtTime(0.25, at + ms / 1000 - 0.012);
    volume.gain.linearRampToValueAtTime(0, at + ms / 1000);
    oscillator.connect(volume).connect(sound.destination);
    oscillator.start(at);
    oscillator.stop(at + ms / 1000);
    at += (ms + pauseMs) / 1000;
  }
}
