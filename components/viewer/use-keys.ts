import type { KeyboardEvent } from 'react';
import { grown, moved, turned } from './marks';
import type { MarkShape } from './marks';
import { shapeOf, toolKeys } from './tools';
import type { Desk } from './use-desk';
import { pictureAt, panned, paneAt, zoomedAbout } from './viewport';

const arrows: Readonly<Record<string, readonly [number, number]>> = {
  ArrowLeft: [-1, 0],
  ArrowRight: [1, 0],
  ArrowUp: [0, -1],
  ArrowDown: [0, 1],
};

/** The keyboard on the pane; true when the key was used. */
export function pressKey(desk: Desk, event: KeyboardEvent, showKeys: () => void): boolean {
  if (event.altKey) return false;
  if (event.ctrlKey || event.metaKey) return undoKeys(desk, event);
  const arrow = arrows[event.key];
  if (arrow) return arrowKey(desk, arrow, event.shiftKey ? 10 : 1);
  if (event.key === '?') return done(showKeys);
  return drawingKeys(desk, event.key) || markKeys(desk, event) || viewKeys(desk, event.key);
}

function done(act: () => void): true {
  act();
  return true;
}

function undoKeys(desk: Desk, event: KeyboardEvent): boolean {
  const key = event.key.toLowerCase();
  if (desk.readOnly || (key !== 'z' && key !== 'y')) return false;
  return done(key === 'y' || event.shiftKey ? desk.history.redo : desk.history.undo);
}

// One step is one pixel of the screen, so that it is finer the more the picture is enlarged.
function arrowKey(desk: Desk, [x, y]: readonly [number, number], steps: number): boolean {
  const { viewport } = desk.pane;
  const step = steps / viewport.zoom;
  if (shapeOf(desk.tool)) {
    const [left, top] = desk.cross;
    return done(() => desk.setCross([left + x * step, top + y * step]));
  }
  const perPixel = Math.max(1, Math.round(step * desk.frame.pitchUm));
  const turn = (desk.frame.turnDeg * Math.PI) / 180;
  const [dx, dy] = [x * Math.cos(turn) + y * Math.sin(turn), x * Math.sin(turn) - y * Math.cos(turn)];
  if (changeSelected(desk, (shape) => moved(shape, dx * perPixel, dy * perPixel))) return true;
  return done(() => desk.pane.setViewport(panned(viewport, -x * steps * 16, -y * steps * 16)));
}

function changeSelected(desk: Desk, change: (shape: MarkShape) => MarkShape): boolean {
  const selected = desk.shapes.find((mark) => mark.id === desk.selectedId);
  if (!selected || desk.readOnly || desk.tool === 'pan') return false;
  desk.put(selected.id, change(selected.shape));
  return true;
}

function drawingKeys(desk: Desk, key: string): boolean {
  const tool = toolKeys[key.toLowerCase()];
  if (tool) return done(() => desk.takeTool(tool));
  if (key === 'Escape') {
    if (desk.points.length > 0) return done(() => desk.setPoints([]));
    if (desk.tool !== 'select') return done(() => desk.takeTool('select'));
    return desk.selectedId === null ? false : done(() => desk.select(null));
  }
  if (!shapeOf(desk.tool)) return false;
  if (key === 'Enter') return done(() => desk.addPoint(desk.cross));
  return (key === 'f' || key === 'F') && done(() => desk.finish());
}

function markKeys(desk: Desk, event: KeyboardEvent): boolean {
  if (event.key === 'Delete' || event.key === 'Backspace') return done(desk.remove);
  if (event.key === '[') return changeSelected(desk, (shape) => turned(shape, 5));
  if (event.key === ']') return changeSelected(desk, (shape) => turned(shape, -5));
  if (event.key === '+' || event.key === '=') return changeSelected(desk, (shape) => grown(shape, 1.1)) || zoomBy(desk, 1.25);
  if (event.key === '-') return changeSelected(desk, (shape) => grown(shape, 1 / 1.1)) || zoomBy(desk, 0.8);
  if (event.key === 'Enter' || event.key.toLowerCase() === 'n') return done(() => selectNext(desk, event.shiftKey ? -1 : 1));
  return false;
}

function selectNext(desk: Desk, by: 1 | -1): void {
  const count = desk.shapes.length;
  if (count === 0) return;
  const present = desk.shapes.findIndex((mark) => mark.id === desk.selectedId);
  const next = present < 0 ? (by > 0 ? 0 : count - 1) : (present + by + count) % count;
  desk.select(desk.shapes[next]?.id ?? null);
}

/** Zooms about the middle of the pane. */
export function zoomBy(desk: Desk, factor: number): true {
  const { viewport, size } = desk.pane;
  desk.pane.setViewport(zoomedAbout(viewport, [size.width / 2, size.height / 2], viewport.zoom * factor));
  return true;
}

/** Shows each pixel of the picture as one pixel of the monitor, aligned to whole pixels. */
export function oneToOne(desk: Desk): true {
  const { viewport, size, devicePixelRatio } = desk.pane;
  const middle = pictureAt(viewport, [size.width / 2, size.height / 2]);
  const exact = zoomedAbout(viewport, paneAt(viewport, middle), 1 / devicePixelRatio);
  desk.pane.setViewport({ ...exact, left: Math.round(exact.left), top: Math.round(exact.top) });
  return true;
}

function viewKeys(desk: Desk, key: string): boolean {
  if (key === '0') return done(desk.pane.fit);
  if (key === '1') return oneToOne(desk);
  return key.toLowerCase() === 'i' && desk.windowing.invertible && done(desk.windowing.invert);
}
