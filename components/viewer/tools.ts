import type { ShapeKind } from './marks';

export const shapeTools = ['circle', 'ellipse', 'polyline', 'polygon'] as const satisfies readonly ShapeKind[];
export const viewTools = ['select', 'pan', 'window', 'region'] as const;
export type Tool = (typeof viewTools)[number] | ShapeKind;

/** The letter that takes a tool. */
export const toolKeys: Readonly<Record<string, Tool>> = {
  v: 'select',
  h: 'pan',
  w: 'window',
  r: 'region',
  c: 'circle',
  e: 'ellipse',
  l: 'polyline',
  p: 'polygon',
};

/** The shape a tool draws, or null. */
export function shapeOf(tool: Tool): ShapeKind | null {
  return shapeTools.find((kind) => kind === tool) ?? null;
}
