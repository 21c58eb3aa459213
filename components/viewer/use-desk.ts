import { useState } from 'react';
import type { RefObject } from 'react';
import { finishesItself, markWith, shapeFrom, workingFrame, workingShape } from './drawing';
import type { PictureScale } from './drawing';
import type { MarkShape } from './marks';
import { regionStatistics } from './packed-pixels';
import type { RegionStatistics } from './packed-pixels';
import type { Windowing } from './picture-canvas';
import { frameOf } from './scale';
import type { PicturePoint } from './scale';
import { shapeOf } from './tools';
import type { Tool } from './tools';
import { useHistory } from './use-history';
import { usePane } from './use-pane';
import { usePicture } from './use-picture';
import type { LoadedPicture } from './use-picture';
import type { ViewerProps } from './viewer-props';
import { pictureAt } from './viewport';

/** A shape being moved or resized, not yet handed on. */
export interface Live {
  readonly id: string;
  readonly shape: MarkShape;
}
export interface Region {
  readonly from: PicturePoint;
  readonly to: PicturePoint;
}

/** Everything on the viewer's desk: picture, window, tool, marks and what is being drawn. */
export function useDesk(props: ViewerProps, paneElement: RefObject<HTMLDivElement | null>) {
  const { source, marks, readOnly = false } = props;
  const loaded = usePicture(source);
  const { picture } = loaded;
  const pane = usePane(paneElement, source);
  const history = useHistory(marks, props.onMarksChange ?? ignore);
  const windowing = useWindowing(picture?.kind === 'grey' ? picture.grey : null, props.palette === 'booth');
  const [tool, setTool] = useState<Tool>(readOnly ? 'pan' : 'select');
  const [ownSelection, setOwnSelection] = useState<string | null>(null);
  const [points, setPoints] = useState<readonly PicturePoint[]>([]);
  const [chosenCross, setCross] = useState<PicturePoint | null>(null);
  const [live, setLive] = useState<Live | null>(null);
  const regions = useRegion(picture, windowing.set);
  const [lineWidthUm, setLineWidthUm] = useState<number | null>(null);
  const scale = scaleOf(props);
  const frame = workingFrame(scale);
  const lineWidthPx = lineWidthUm === null ? 4 : lineWidthUm / frame.pitchUm;
  const cross = chosenCross ?? pictureAt(pane.viewport, [pane.size.width / 2, pane.size.height / 2]);
  const selectedId = props.selectedId === undefined ? ownSelection : props.selectedId;
  const select = (id: string | null) => {
    setOwnSelection(id);
    props.onSelect?.(id);
  };
  const focus = () => paneElement.current?.focus();
  const put = (id: string, shape: MarkShape) =>
    history.change(marks.map((mark) => (mark.id === id ? { ...mark, ...markWith(id, shape, scale) } : mark)));
  const finish = (places: readonly PicturePoint[] = points) => {
    const kind = shapeOf(tool);
    const shape = kind ? shapeFrom(kind, places, lineWidthPx, frame) : null;
    setPoints([]);
    if (!shape) return;
    const id = nextId([...marks.map((mark) => mark.id), ...(props.takenIds ?? [])]);
    history.change([...marks, markWith(id, shape, scale)]);
    select(id);
  };
  const addPoint = (point: PicturePoint) => {
    const kind = shapeOf(tool);
    if (!kind || readOnly) return;
    (points.length === 1 && finishesItself(kind) ? finish : setPoints)([...points, point]);
  };
  const remove = () => {
    if (readOnly || selectedId === null) return;
    history.change(marks.filter((mark) => mark.id !== selectedId));
    select(null);
    // Without this the deleted element keeps the focus and Ctrl Z reaches nothing.
    focus();
  };
  const takeTool = (next: Tool) => {
    if (readOnly && shapeOf(next)) return;
    setTool(next);
    setPoints([]);
    setCross(null);
    focus();
  };
  const shapes = marks.flatMap((mark) => {
    const shape = live?.id === mark.id ? live.shape : workingShape(mark, scale);
    return shape ? [{ id: mark.id, shape, verdict: props.verdicts?.[mark.id] }] : [];
  });
  return {
    ...loaded,
    ...{ pane, history, windowing, tool, takeTool, readOnly, scale, frame },
    ...{ points, setPoints, addPoint, finish, cross, setCross, live, setLive, ...regions },
    ...{ selectedId, select, put, remove, shapes, lineWidthPx, lineWidthUm, setLineWidthUm, focus, source },
  };
}
export type Desk = ReturnType<typeof useDesk>;

function ignore(): void {
  // A viewer without a listener shows marks and changes none.
}

function scaleOf({ source, registration, registrationCalibrated = false }: ViewerProps): PictureScale {
  const pitchUm = source.pixelPitchUm ?? registration?.pitchUm;
  const known = pitchUm !== undefined && pitchUm > 0;
  return {
    heightPx: source.height,
    frame: known ? frameOf(source.height, { ...registration, pitchUm }) : null,
    calibrated: known && (Boolean(source.pixelPitchUm) || registrationCalibrated),
  };
}

/** The next free number over all ids that are numbers. */
export function nextId(taken: readonly string[]): string {
  return String(1 + Math.max(0, ...taken.map(Number).filter((value) => Number.isInteger(value))));
}

interface Range {
  readonly minimum: number;
  readonly maximum: number;
  readonly window: { readonly low: number; readonly high: number } | null;
  readonly inverse: boolean;
}

function useWindowing(range: Range | null, booth: boolean) {
  const [chosen, setChosen] = useState<{ low: number; high: number } | null>(null);
  const [turned, setTurned] = useState(false);
  const start = range?.window ?? { low: range?.minimum ?? 0, high: range?.maximum ?? 65535 };
  const { low, high } = chosen ?? start;
  const current: Windowing = { low, high, invert: (turned && !booth) !== (range?.inverse ?? false) };
  const set = (nextLow: number, nextHigh: number) => {
    const bottom = Math.min(65534, Math.max(0, Math.round(nextLow)));
    setChosen({ low: bottom, high: Math.min(65535, Math.max(bottom + 1, Math.round(nextHigh))) });
  };
  return {
    ...{ current, set, available: range !== null, invertible: !booth, inverted: turned && !booth },
    invert: () => setTurned(!turned),
    whole: () => setChosen({ low: range?.minimum ?? 0, high: range?.maximum ?? 65535 }),
  };
}

function statisticsOf(picture: LoadedPicture | null, { from, to }: Region): RegionStatistics | null {
  return picture?.kind === 'grey' ? regionStatistics(picture.grey, from, to) : null;
}

function useRegion(picture: LoadedPicture | null, setWindow: (low: number, high: number) => void) {
  const [region, setRegion] = useState<Region | null>(null);
  const [statistics, setStatistics] = useState<RegionStatistics | null>(null);
  const takeRegion = (taken: Region) => {
    setRegion(taken);
    const found = statisticsOf(picture, taken);
    setStatistics(found);
    if (found && found.high > found.low) setWindow(found.low, found.high);
  };
  return { region, setRegion, statistics, takeRegion };
}
