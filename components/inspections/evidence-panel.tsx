'use client';

import { useState } from 'react';
import { sendJson } from '@/components/forms/send-json';
import { useMessages } from '@/components/theme/use-messages';
import { useWorkstation } from '@/components/theme/workstation';
import { Button } from '@/components/ui/button';
import { ProblemNotice } from '@/components/ui/notice';
import { problemOf, ProblemError, type Problem } from '@/components/ui/problem';
import type { Mark, MarkShape } from '@/components/viewer/marks';
import { Viewer } from '@/components/viewer/viewer';
import type { InspectionAnswer } from '@/services/contracts/inspections';
import { verdictOf } from './indications-panel';
import type { ZoneRow } from './plan-rows';
import type { Draft } from './use-draft';

/** Sends a file with progress in percent; the server's refusal is thrown as a ProblemError. */
function upload(url: string, file: File, onProgress: (percent: number) => void): Promise<{ id: string }> {
  return new Promise((done, refuse) => {
    const request = new XMLHttpRequest();
    request.open('POST', url);
    request.upload.onprogress = ({ loaded, total }) => onProgress(Math.round((100 * loaded) / Math.max(1, total)));
    request.onerror = () => refuse(new TypeError('no answer'));
    request.onload = () => {
      const answer = JSON.parse(request.responseText === '' ? '{}' : request.responseText) as { id: string };
      if (request.status < 300) done(answer);
      else refuse(new ProblemError(answer as unknown as Problem));
    };
    request.send(file);
  });
}

export interface EvidencePanelProps {
  readonly draft: Draft;
  readonly answer: InspectionAnswer;
  readonly zones: readonly ZoneRow[];
  readonly readOnly: boolean;
  readonly onAttached: () => void;
}

function marksOf(draft: Draft, evidence: string): Mark[] {
  return draft.content.indications
    .filter((one) => one.evidence === evidence)
    .map((one) => ({ id: one.id, shape: one.shape as MarkShape | null, scale: 'calibrated' }));
}

/** The picture with its marks, and what is attached. */
export function EvidencePanel({ draft, answer, zones, readOnly, onAttached }: EvidencePanelProps) {
  const t = useMessages('inspections');
  const { palette } = useWorkstation();
  const [chosen, setChosen] = useState<string>();
  const [sending, setSending] = useState<{ name: string; percent: number }>();
  const [problem, setProblem] = useState<Problem>();
  const [pitch, setPitch] = useState<number | null>(null);
  const role =
    answer.requirement.evidence[0]?.role ?? (answer.requirement.method === 'radiography' ? 'radiograph' : 'photograph');
  const view = answer.requirement.views[0] ?? answer.views[0]?.name ?? '';
  const shown = answer.evidence.find(({ id }) => id === chosen) ?? answer.evidence[0];
  const attach = async (file: File) => {
    setProblem(undefined);
    try {
      const { id } = await upload(`/api/evidence?kind=${role}&name=${encodeURIComponent(file.name)}`, file, (percent) =>
        setSending({ name: file.name, percent }),
      );
      await sendJson(`/api/inspections/${answer.id}/evidence/${id}`, { method: 'PUT', body: { role, view } });
      setChosen(id);
      onAttached();
    } catch (failure) {
      setProblem(problemOf(failure));
    }
    setSending(undefined);
  };
  const onMarks = (marks: readonly Mark[]) => {
    if (!shown) return;
    const others = draft.content.indications.filter((one) => one.evidence !== shown.id);
    const own = marks.map((mark) => {
      const before = draft.content.indications.find(({ id }) => id === mark.id);
      return { type: 'gas-pore', view: shown.view ?? view, ...before, id: mark.id, shape: mark.shape, evidence: shown.id };
    });
    draft.change({ indications: [...others, ...own] });
  };
  const verdicts = Object.fromEntries(
    draft.content.indications.flatMap(({ id }) => (verdictOf(draft, id) ? [[id, verdictOf(draft, id) ?? 'accept']] : [])),
  );
  const grey = shown?.mediaType === 'application/dicom' || (shown?.bits ?? 8) > 8;
  const known = shown?.pixelPitchUm ? Number(shown.pixelPitchUm) : null;
  return (
    <section aria-label={t('evidence')} className="flex min-h-0 flex-1 flex-col gap-2">
      <div className="flex flex-wrap items-center gap-2">
        {answer.evidence.map((one) => (
          <Button key={one.id} aria-pressed={one.id === shown?.id} onClick={() => setChosen(one.id)}>
            {t('show', { name: one.name })}
          </Button>
        ))}
        {readOnly ? null : (
          <label className="flex items-center gap-2">
            <span className="font-semibold">{t('upload')}</span>
            <input type="file" onChange={(event) => event.target.files?.[0] && void attach(event.target.files[0])} />
          </label>
        )}
        {sending ? <span role="status">{t('uploading', sending)}</span> : null}
      </div>
      {problem ? <ProblemNotice problem={problem} /> : null}
      <div className="relative min-h-80 flex-1 border border-line bg-raised">
        {shown?.width && shown.height ? (
          <Viewer
            key={shown.id}
            source={{
              kind: grey ? 'packed16' : 'picture',
              url: grey ? `/api/evidence/${shown.id}/pixels` : `/api/evidence/${shown.id}/preview`,
              width: shown.width,
              height: shown.height,
              pixelPitchUm: known,
            }}
            view={shown.view ?? view}
            zones={zones.filter((zone) => zone.view === (shown.view ?? view))}
            marks={marksOf(draft, shown.id)}
            onMarksChange={onMarks}
            readOnly={readOnly}
            palette={palette}
            registration={known === null && pitch !== null ? { pitchUm: pitch } : null}
            onScaleEntered={setPitch}
            verdicts={verdicts}
            takenIds={draft.content.indications.map(({ id }) => id)}
          />
        ) : (
          <p className="p-4 text-ink-soft">{t('noPicture')}</p>
        )}
      </div>
    </section>
  );
}
