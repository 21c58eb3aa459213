import { useEffect, useRef, useState } from 'react';
import { greyPainter } from './grey-painter';
import type { GreyPainter } from './grey-view';
import type { GreyPicture } from './packed-pixels';
import type { LoadedPicture } from './use-picture';
import type { Pane } from './use-pane';

export interface Windowing {
  readonly low: number;
  readonly high: number;
  readonly invert: boolean;
}
interface CanvasProps {
  readonly pane: Pane;
  readonly windowing: Windowing;
}

/** The pixels themselves. Marks lie above, on a layer of their own. */
export function PictureCanvas({ picture, ...rest }: CanvasProps & { readonly picture: LoadedPicture }) {
  return picture.kind === 'grey' ? <GreyCanvas grey={picture.grey} {...rest} /> : <ImageCanvas image={picture.image} {...rest} />;
}

const fill = 'absolute inset-0 size-full';

function screenSize(pane: Pane) {
  return {
    width: Math.round(pane.size.width * pane.devicePixelRatio),
    height: Math.round(pane.size.height * pane.devicePixelRatio),
  };
}

function GreyCanvas({ grey, pane, windowing }: CanvasProps & { readonly grey: GreyPicture }) {
  const canvas = useRef<HTMLCanvasElement>(null);
  const [painter, setPainter] = useState<GreyPainter | null>(null);
  useEffect(() => {
    if (!canvas.current) return;
    const made = greyPainter(canvas.current, grey);
    setPainter(made);
    return () => made.release();
  }, [grey]);
  const { width, height } = screenSize(pane);
  const { viewport, devicePixelRatio } = pane;
  useEffect(() => {
    if (painter && width > 0 && height > 0) painter.paint({ viewport, devicePixelRatio, ...windowing });
  }, [painter, width, height, viewport, devicePixelRatio, windowing]);
  return <canvas ref={canvas} width={width} height={height} className={fill} data-painter={painter?.by} aria-hidden />;
}

function ImageCanvas({ image, pane, windowing }: CanvasProps & { readonly image: HTMLImageElement }) {
  const canvas = useRef<HTMLCanvasElement>(null);
  const { width, height } = screenSize(pane);
  const { viewport, devicePixelRatio } = pane;
  useEffect(() => {
    const context = canvas.current?.getContext('2d');
    if (!context) return;
    const scale = viewport.zoom * devicePixelRatio;
    context.setTransform(1, 0, 0, 1, 0, 0);
    context.clearRect(0, 0, width, height);
    context.imageSmoothingEnabled = scale < 2;
    context.imageSmoothingQuality = 'high';
    context.filter = windowing.invert ? 'invert(1)' : 'none';
    context.setTransform(scale, 0, 0, scale, -viewport.left * scale, -viewport.top * scale);
    context.drawImage(image, 0, 0);
  }, [image, width, height, viewport, devicePixelRatio, windowing.invert]);
  return <canvas ref={canvas} width={width} height={height} className={fill} data-painter="picture" aria-hidden />;
}
