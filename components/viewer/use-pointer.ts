import { useRef } from 'react';
import type { PointerEvent } from 'react';
import { shapeFrom } from './drawing';
import { handlesOf, moved, pulled } from './marks';
import type { MarkShape } from './marks';
import { toView } from './scale';
import type { PicturePoint } from './scale';
import { shapeOf } from './tools';
import type { Desk } from './use-desk';
import { panned, pictureAt, zoomedAbout } from './viewport';

type Gesture =
  | { readonly kind: 'pan' }
  | { readonly kind: 'window'; readonly low: number; readonly high: number; readonly start: PicturePoint }
  | { readonly kind: 'region'; readonly from: PicturePoint }
  | { readonly kind: 'draw'; readonly from: PicturePoint }
  | { readonly kind: 'move'; readonly id: string; readonly from: PicturePoint; readonly shape: MarkShape }
  | {
      readonly kind: 'pull';
      readonly id: string;
      readonly handle: number;
      readonly from: PicturePoint;
      readonly shape: MarkShape;
    };

/** Mouse, pen and fingers on the pane: one pointer works with the tool, two fingers zoom and move. */
export function usePointer(desk: Desk) {
  const fingers = useRef(new Map<number, PicturePoint>());
  const gesture = useRef<Gesture | null>(null);
  const place = (event: PointerEvent<HTMLElement>): PicturePoint => {
    const box = event.currentTarget.getBoundingClientRect();
    return [event.clientX - box.left - event.currentTarget.clientLeft, event.clientY - box.top - event.currentTarget.clientTop];
  };
  const onPointerDown = (event: PointerEvent<HTMLElement>) => {
    if (event.button > 1) return;
    const at = place(event);
    event.currentTarget.setPointerCapture(event.pointerId);
    desk.focus();
    fingers.current.set(event.pointerId, at);
    if (fingers.current.size > 1) {
      gesture.current = null;
      desk.setLive(null);
      desk.setPoints([]);
      return;
    }
    gesture.current = event.button === 1 ? { kind: 'pan' } : begin(desk, event.target, at);
  };
  const onPointerMove = (event: PointerEvent<HTMLElement>) => {
    const at = place(event);
    const before = fingers.current.get(event.pointerId);
    if (!before) {
      if (shapeOf(desk.tool)) desk.setCross(pictureAt(desk.pane.viewport, at));
      return;
    }
    const others = [...fingers.current].filter(([id]) => id !== event.pointerId);
    fingers.current.set(event.pointerId, at);
    const other = others[0]?.[1];
    if (other) pinch(desk, before, at, other);
    else if (gesture.current) follow(desk, gesture.current, before, at);
  };
  const onPointerUp = (event: PointerEvent<HTMLElement>) => {
    const at = place(event);
    fingers.current.delete(event.pointerId);
    const ended = gesture.current;
    gesture.current = null;
    if (ended && event.type === 'pointerup') end(desk, ended, pictureAt(desk.pane.viewport, at));
    else desk.setLive(null);
  };
  const onDoubleClick = () => {
    if (desk.points.length > 0) desk.finish();
  };
  return { onPointerDown, onPointerMove, onPointerUp, onPointerCancel: onPointerUp, onDoubleClick };
}

function begin(desk: Desk, target: EventTarget, at: PicturePoint): Gesture | null {
  const from = pictureAt(desk.pane.viewport, at);
  if (desk.tool === 'pan') return { kind: 'pan' };
  if (desk.tool === 'window') return desk.windowing.available ? { kind: 'window', start: at, ...desk.windowing.current } : null;
  if (desk.tool === 'region') return { kind: 'region', from };
  if (shapeOf(desk.tool)) {
    desk.setCross(from);
    return { kind: 'draw', from };
  }
  const element = target instanceof Element ? target : null;
  const handle = element?.closest('[data-handle]')?.getAttribute('data-handle');
  const id = handle ? desk.selectedId : (element?.closest('[data-mark]')?.getAttribute('data-mark') ?? null);
  const shape = desk.shapes.find((mark) => mark.id === id)?.shape;
  if (id === null || !shape) {
    desk.select(null);
    return { kind: 'pan' };
  }
  if (!handle) desk.select(id);
  if (desk.readOnly) return null;
  return handle ? { kind: 'pull', id, handle: Number(handle), from, shape } : { kind: 'move', id, from, shape };
}

function follow(desk: Desk, gesture: Gesture, before: PicturePoint, at: PicturePoint): void {
  const to = pictureAt(desk.pane.viewport, at);
  if (gesture.kind === 'pan') desk.pane.setViewport(panned(desk.pane.viewport, at[0] - before[0], at[1] - before[1]));
  if (gesture.kind === 'window') dragWindow(desk, gesture, at);
  if (gesture.kind === 'region') desk.setRegion({ from: gesture.from, to });
  if (gesture.kind === 'draw') desk.setCross(to);
  if (gesture.kind === 'draw' && isDrag(desk, gesture.from, to) && (desk.tool === 'circle' || desk.tool === 'ellipse'))
    desk.setPoints([gesture.from]);
  const changed = changedShape(desk, gesture, to);
  if (changed && 'id' in gesture) desk.setLive({ id: gesture.id, shape: changed });
}

// Across widens the window, up and down moves its level: a full pane is the range of the picture.
function dragWindow(desk: Desk, { low, high, start }: Extract<Gesture, { kind: 'window' }>, at: PicturePoint): void {
  const span = Math.max(64, high - low);
  const width = Math.max(1, span * (1 + (at[0] - start[0]) / 300));
  const level = (low + high) / 2 + (span * (at[1] - start[1])) / 300;
  desk.windowing.set(level - width / 2, level + width / 2);
}

function changedShape(desk: Desk, gesture: Gesture, to: PicturePoint): MarkShape | null {
  if (gesture.kind !== 'move' && gesture.kind !== 'pull') return null;
  const [start, now] = [toView(desk.frame, gesture.from), toView(desk.frame, to)];
  const [dx, dy] = [now[0] - start[0], now[1] - start[1]];
  if (dx === 0 && dy === 0) return null;
  if (gesture.kind === 'move') return moved(gesture.shape, dx, dy);
  const handle = handlesOf(gesture.shape)[gesture.handle];
  return handle ? pulled(gesture.shape, gesture.handle, [handle[0] + dx, handle[1] + dy]) : null;
}

function end(desk: Desk, gesture: Gesture, to: PicturePoint): void {
  desk.setLive(null);
  if (gesture.kind === 'region') desk.takeRegion({ from: gesture.from, to });
  const changed = changedShape(desk, gesture, to);
  if (changed && 'id' in gesture) desk.put(gesture.id, changed);
  if (gesture.kind !== 'draw') return;
  const kind = shapeOf(desk.tool);
  const dragged =
    isDrag(desk, gesture.from, to) &&
    (kind === 'circle' || kind === 'ellipse') &&
    shapeFrom(kind, [gesture.from, to], desk.lineWidthPx, desk.frame);
  if (dragged) desk.finish([gesture.from, to]);
  else desk.addPoint(to);
}

function pinch(desk: Desk, before: PicturePoint, at: PicturePoint, other: PicturePoint): void {
  const apart = (point: PicturePoint) => Math.max(1, Math.hypot(point[0] - other[0], point[1] - other[1]));
  const middle: PicturePoint = [(at[0] + other[0]) / 2, (at[1] + other[1]) / 2];
  const zoomed = zoomedAbout(desk.pane.viewport, middle, desk.pane.viewport.zoom * (apart(at) / apart(before)));
  desk.pane.setViewport(panned(zoomed, (at[0] - before[0]) / 2, (at[1] - before[1]) / 2));
}

// A hand that trembles on a click draws nothing of its own.
function isDrag(desk: Desk, from: PicturePoint, to: PicturePoint): boolean {
  return Math.hypot(to[0] - from[0], to[1] - from[1]) * desk.pane.viewport.zoom > 4;
}
