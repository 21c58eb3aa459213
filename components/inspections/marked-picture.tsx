'use client';

import { isPicture, type AttachedFile } from '@/components/evidence/attached-files';
import { registrationIn } from '@/components/evidence/picture-scale';
import { ScaleField } from '@/components/evidence/scale-field';
import { useWorkstation } from '@/components/theme/workstation';
import type { Mark, MarkShape } from '@/components/viewer/marks';
import { Viewer } from '@/components/viewer/viewer';
import type { ViewerSource } from '@/components/viewer/viewer-props';
import { verdictOf, type Indication } from './indication-words';
import type { ZoneRow } from './plan-rows';
import type { Draft } from './use-draft';

export interface MarkedPictureProps {
  readonly draft: Draft;
  readonly file: AttachedFile;
  readonly zones: readonly ZoneRow[];
  readonly nextType: string;
  readonly selectedId: string | null;
  readonly onSelect: (id: string | null) => void;
  readonly onPitch: (pitchUm: number) => void;
  /** Marks are drawn only where the plan has rules for them. */
  readonly readOnly: boolean;
}

/** Sixteen bits from the packed pixels; a photograph as stored; what a browser cannot show itself as a preview. */
function sourceOf(file: AttachedFile): ViewerSource | null {
  if (!isPicture(file) || file.width === null || file.height === null) return null;
  const asStored = file.mediaType === 'image/jpeg' || file.mediaType === 'image/png';
  return {
    kind: file.hasPixels ? 'packed16' : 'picture',
    url: `/api/evidence/${file.id}${file.hasPixels ? '/pixels' : asStored ? '' : '/preview'}`,
    width: file.width,
    height: file.height,
    pixelPitchUm: file.pixelPitchUm === null ? null : Number(file.pixelPitchUm),
  };
}

function isDrawn(shape: unknown): shape is MarkShape {
  return typeof shape === 'object' && shape !== null && 'kind' in shape && shape.kind !== 'entered';
}

function marksOn(file: AttachedFile, indications: readonly Indication[], calibrated: boolean): Mark[] {
  return indications.flatMap((one): Mark[] =>
    one.evidence === file.id && isDrawn(one.shape)
      ? [{ id: one.id, shape: one.shape, scale: calibrated ? 'calibrated' : 'indicative' }]
      : [],
  );
}

/** A picture with the indications marked on it. Without a scale nothing is marked: a mark without a size could not be judged. */
export function MarkedPicture(props: MarkedPictureProps) {
  const { draft, file, zones, nextType, selectedId, onSelect, onPitch, readOnly } = props;
  const { palette } = useWorkstation();
  const source = sourceOf(file);
  if (!source) return null;
  const registration = registrationIn(file.registration);
  const scaled = source.pixelPitchUm !== null || registration !== null;
  const { indications } = draft.content;
  const view = file.view ?? '';
  const onMarks = (marks: readonly Mark[]) => {
    const byId = new Map(marks.map((mark) => [mark.id, mark]));
    const before = new Set(indications.map(({ id }) => id));
    const kept = indications.flatMap((one): Indication[] => {
      if (one.evidence !== file.id || !isDrawn(one.shape)) return [one];
      const mark = byId.get(one.id);
      return mark ? [{ ...one, shape: mark.shape }] : [];
    });
    const made = marks
      .filter(({ id }) => !before.has(id))
      .map(({ id, shape }): Indication => ({ id, type: nextType, view, shape, evidence: file.id }));
    draft.change({ indications: [...kept, ...made] });
  };
  const verdicts = Object.fromEntries(
    indications.flatMap(({ id }) => {
      const verdict = verdictOf(draft.judgement.evaluation, id);
      return verdict ? [[id, verdict]] : [];
    }),
  );
  return (
    <div className="flex size-full min-h-0 flex-col">
      {scaled || readOnly ? null : <ScaleField widthPx={source.width} onPitch={onPitch} />}
      <div className="min-h-0 flex-1">
        <Viewer
          // A corrected scale starts the viewer afresh: steps to undo would hold shapes of the old scale.
          key={`${file.id} ${String(registration?.pitchUm ?? 0)}`}
          source={source}
          view={view}
          zones={zones.filter((zone) => zone.view === view)}
          marks={marksOn(file, indications, source.pixelPitchUm !== null || registration?.calibrated === true)}
          onMarksChange={onMarks}
          readOnly={readOnly || !scaled}
          palette={palette}
          registration={registration}
          registrationCalibrated={registration?.calibrated ?? false}
          onScaleEntered={onPitch}
          verdicts={verdicts}
          selectedId={selectedId}
          onSelect={onSelect}
          takenIds={indications.map(({ id }) => id)}
        />
      </div>
    </div>
  );
}
