import type { PicturePoint } from './scale';

/** What part of the picture is shown: CSS pixels per picture pixel, and the picture place at the upper left corner of the window. */
export interface Viewport {
  readonly zoom: number;
  readonly left: number;
  readonly top: number;
}
export interface Size {
  readonly width: number;
  readonly height: number;
}

const leastZoom = 0.01;
const mostZoom = 64;

/** The whole picture, centred. */
export function fitted(picture: Size, pane: Size): Viewport {
  const zoom = clamp(Math.min(pane.width / picture.width, pane.height / picture.height), leastZoom, mostZoom);
  return { zoom, left: (picture.width - pane.width / zoom) / 2, top: (picture.height - pane.height / zoom) / 2 };
}

/** Zooms about a place of the window (CSS pixels), which keeps its picture place. */
export function zoomedAbout(viewport: Viewport, at: PicturePoint, zoom: number): Viewport {
  const next = clamp(zoom, leastZoom, mostZoom);
  const [x, y] = pictureAt(viewport, at);
  return { zoom: next, left: x - at[0] / next, top: y - at[1] / next };
}

/** Moves the picture by CSS pixels. */
export function panned(viewport: Viewport, dx: number, dy: number): Viewport {
  return { ...viewport, left: viewport.left - dx / viewport.zoom, top: viewport.top - dy / viewport.zoom };
}

/** The picture place under a place of the window. */
export function pictureAt(viewport: Viewport, [x, y]: PicturePoint): PicturePoint {
  return [viewport.left + x / viewport.zoom, viewport.top + y / viewport.zoom];
}

/** The place of the window over a picture place. */
export function paneAt(viewport: Viewport, [x, y]: PicturePoint): PicturePoint {
  return [(x - viewport.left) * viewport.zoom, (y - viewport.top) * viewport.zoom];
}

/** Screen pixels per picture pixel in per cent: 100 means that each picture pixel is one pixel of the monitor. */
export function trueScalePercent(viewport: Viewport, devicePixelRatio: number): number {
  return viewport.zoom * devicePixelRatio * 100;
}

function clamp(value: number, least: number, most: number): number {
  return Math.min(most, Math.max(least, value));
}
