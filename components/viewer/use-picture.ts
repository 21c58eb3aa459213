import { useEffect, useState } from 'react';
import { unpackPixels } from './packed-pixels';
import type { GreyPicture } from './packed-pixels';
import type { ViewerSource } from './viewer-props';

export type LoadedPicture =
  { readonly kind: 'grey'; readonly grey: GreyPicture } | { readonly kind: 'image'; readonly image: HTMLImageElement };

export interface PictureState {
  readonly picture: LoadedPicture | null;
  readonly fault: string | null;
  readonly again: () => void;
}

interface Answer {
  readonly url: string;
  readonly picture: LoadedPicture | null;
  readonly fault: string | null;
}

/** Fetches the pixels of a source; `again` repeats after a fault. */
export function usePicture({ kind, url }: ViewerSource): PictureState {
  const [answer, setAnswer] = useState<Answer | null>(null);
  const [attempt, setAttempt] = useState(0);
  useEffect(() => {
    const stop = new AbortController();
    const loading = kind === 'packed16' ? loadGrey(url, stop.signal) : loadImage(url);
    loading.then(
      (picture) => {
        if (!stop.signal.aborted) setAnswer({ url, picture, fault: null });
      },
      (error: unknown) => {
        if (!stop.signal.aborted)
          setAnswer({ url, picture: null, fault: error instanceof Error ? error.message : String(error) });
      },
    );
    return () => stop.abort();
  }, [kind, url, attempt]);
  const current = answer?.url === url ? answer : null;
  const again = () => {
    setAnswer(null);
    setAttempt(attempt + 1);
  };
  return { picture: current?.picture ?? null, fault: current?.fault ?? null, again };
}

async function loadGrey(url: string, signal: AbortSignal): Promise<LoadedPicture> {
  const response = await fetch(url, { signal });
  if (!response.ok) throw new Error(`${String(response.status)} ${response.statusText}`);
  return { kind: 'grey', grey: await unpackPixels(await response.arrayBuffer()) };
}

async function loadImage(url: string): Promise<LoadedPicture> {
  const image = new Image();
  image.src = url;
  await image.decode();
  return { kind: 'image', image };
}
