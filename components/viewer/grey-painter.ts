import type { GreyPainter } from './grey-view';
import { meanLevels } from './packed-pixels';
import type { GreyLevel, GreyPicture } from './packed-pixels';
import { paintWithTable } from './paint-with-table';
import { webGlPainter } from './webgl-painter';

/** A painter on a canvas: WebGL2 with 16-bit textures, or a look-up table where that is not to be had. One canvas keeps one of them. */
export function greyPainter(canvas: HTMLCanvasElement, picture: GreyPicture): GreyPainter {
  const levels = meanLevels(picture);
  return webGlPainter(canvas, levels) ?? tablePainter(canvas, levels);
}

function tablePainter(canvas: HTMLCanvasElement, levels: readonly GreyLevel[]): GreyPainter {
  const context = canvas.getContext('2d', { alpha: false });
  return {
    by: 'table',
    paint: (view) => {
      if (context) paintWithTable(context, levels, view);
    },
    release: () => undefined,
  };
}
