import { useEffect, useState } from 'react';
import type { RefObject } from 'react';
import { fitted } from './viewport';
import type { Size, Viewport } from './viewport';

export interface Pane {
  readonly size: Size;
  readonly devicePixelRatio: number;
  readonly viewport: Viewport;
  readonly setViewport: (next: Viewport) => void;
  readonly fit: () => void;
}

/** Size of the window on the picture and what it shows; it follows the pane until a person zooms or moves. */
export function usePane(element: RefObject<HTMLElement | null>, picture: Size): Pane {
  const [size, setSize] = useState<Size>({ width: 0, height: 0 });
  const [devicePixelRatio, setDevicePixelRatio] = useState(1);
  const [chosen, setChosen] = useState<Viewport | null>(null);
  useEffect(() => {
    const pane = element.current;
    if (!pane) return;
    const measure = () => {
      setSize({ width: pane.clientWidth, height: pane.clientHeight });
      setDevicePixelRatio(window.devicePixelRatio);
    };
    const observer = new ResizeObserver(measure);
    observer.observe(pane);
    // Zooming the browser changes the ratio without always changing the pane.
    window.addEventListener('resize', measure);
    return () => {
      observer.disconnect();
      window.removeEventListener('resize', measure);
    };
  }, [element]);
  const viewport = chosen ?? fitted(picture, { width: Math.max(1, size.width), height: Math.max(1, size.height) });
  return { size, devicePixelRatio, viewport, setViewport: setChosen, fit: () => setChosen(null) };
}
