import { describe, expect, it } from 'vitest';
import { inFrame, shapeFrom } from '@/components/viewer/drawing';
import { handlesOf, pulled } from '@/components/viewer/marks';
import { frameOf, pitchFromWidth, toPicture, toView } from '@/components/viewer/scale';

describe('pixels and micrometres', () => {
  const frame = frameOf(1000, { pitchUm: 50 });
  it('counts y upwards from the lower left corner', () => {
    expect(toView(frame, [0, 1000])).toEqual([0, 0]);
    expect(toView(frame, [10.5, 989.5])).toEqual([525, 525]);
  });
  it('comes back to the same pixel under a turned registration', () => {
    const turned = frameOf(1000, { pitchUm: 47.3, originPx: [120, 800], turnDeg: 33 });
    const [x, y] = toPicture(turned, toView(turned, [333.3, 77.7]));
    expect(Math.hypot(x - 333.3, y - 77.7)).toBeLessThan(0.02);
    expect(toView(frameOf(10, { pitchUm: 100, originPx: [0, 0], turnDeg: 90 }), [1, 0])).toEqual([0, 100]);
  });
  it('draws full diameters and axes', () => {
    expect(
      shapeFrom(
        'circle',
        [
          [100, 100],
          [104, 103],
        ],
        4,
        frame,
      ),
    ).toEqual({ kind: 'circle', center: [5000, 45000], diameter: 500 });
    expect(
      shapeFrom(
        'ellipse',
        [
          [100, 100],
          [104, 103],
        ],
        4,
        frame,
      ),
    ).toMatchObject({ axes: [400, 300], angle: 0 });
    expect(
      shapeFrom(
        'polygon',
        [
          [1, 1],
          [2, 2],
        ],
        4,
        frame,
      ),
    ).toBeNull();
  });
  it('a handle pulled to where it is changes nothing', () => {
    const shape = { kind: 'ellipse', center: [100, 200], axes: [800, 300], angle: 30 } as const;
    const [first, second] = handlesOf(shape);
    expect(pulled(shape, 0, first ?? [0, 0])).toEqual(shape);
    expect(pulled(shape, 1, second ?? [0, 0])).toEqual(shape);
  });
  it('keeps its place in the picture when a scale is entered', () => {
    const entered = frameOf(1000, { pitchUm: pitchFromWidth(2000, 60) });
    expect(
      inFrame({ kind: 'circle', center: [100000, 50000], diameter: 4000 }, frameOf(1000, { pitchUm: 1000 }), entered),
    ).toEqual({ kind: 'circle', center: [3000, 1500], diameter: 120 });
  });
});
