'use client';

import { useState } from 'react';
import { registrationIn, rescaled } from '@/components/evidence/picture-scale';
import { useUploads, type Uploads } from '@/components/evidence/use-uploads';
import { isPicture, type AttachedFile } from '@/components/evidence/attached-files';
import { sendJson } from '@/components/forms/send-json';
import { problemOf, type Problem } from '@/components/ui/problem';
import type { MarkShape } from '@/components/viewer/marks';
import type { EvidenceRole } from '@/services/contracts/evidence';
import type { InspectionAnswer } from '@/services/contracts/inspections';
import type { Draft } from './use-draft';

export interface Evidence {
  readonly uploads: Uploads;
  readonly shown: AttachedFile | undefined;
  readonly show: (id: string) => void;
  /** The view that a file attached next shows. */
  readonly view: string;
  readonly chooseView: (view: string) => void;
  readonly detach: (file: AttachedFile) => void;
  /** Says which view a picture shows, or how large its pixels are; marks keep their places in the picture. */
  readonly relink: (file: AttachedFile, next: { view?: string; pitchUm?: number }) => void;
  readonly problem: Problem | undefined;
}

/** What is attached to this inspection and what of it is on show; `renew` reads the inspection again. */
export function useEvidence(answer: InspectionAnswer, draft: Draft, renew: () => Promise<unknown>): Evidence {
  const [chosen, setChosen] = useState<string>();
  const [problem, setProblem] = useState<Problem>();
  const [wanted, chooseView] = useState<string>();
  const asked = answer.requirement.views.length > 0 ? answer.requirement.views : answer.views.map(({ name }) => name);
  // What is attached next most likely shows the first view that has no picture yet.
  const view = wanted ?? asked.find((name) => !answer.evidence.some((file) => file.view === name)) ?? asked[0] ?? '';
  const linkUrl = (id: string) => `/api/inspections/${answer.id}/evidence/${id}`;
  const put = (id: string, body: { role: EvidenceRole; view: string | null; registration?: unknown }) =>
    sendJson(linkUrl(id), { method: 'PUT', body });
  const uploads = useUploads(async (stored, role) => {
    const picture = role === 'radiograph' || role === 'photograph';
    await put(stored.id, { role, view: picture && view !== '' ? view : null });
    if (picture) {
      setChosen(stored.id);
      chooseView(undefined);
    }
    await renew();
  });
  const trying = async (work: () => Promise<unknown>) => {
    setProblem(undefined);
    try {
      await work();
      await renew();
    } catch (failure) {
      setProblem(problemOf(failure));
    }
  };
  const relink = (file: AttachedFile, next: { view?: string; pitchUm?: number }) =>
    void trying(async () => {
      const before = registrationIn(file.registration);
      const registration = next.pitchUm === undefined ? before : { ...before, pitchUm: next.pitchUm, calibrated: false };
      const changed = next.view ?? file.view;
      await put(file.id, { role: file.role, view: changed, ...(registration ? { registration } : {}) });
      const { indications } = draft.content;
      if (!indications.some(({ evidence }) => evidence === file.id)) return;
      const moved = (shape: unknown) =>
        before && registration && shape && file.height !== null
          ? rescaled(shape as MarkShape, file.height, before, registration)
          : shape;
      draft.change({
        indications: indications.map((one) =>
          one.evidence === file.id ? { ...one, view: changed ?? one.view, shape: moved(one.shape) } : one,
        ),
      });
    });
  const pictures = answer.evidence.filter(isPicture);
  return {
    uploads,
    shown: pictures.find(({ id }) => id === chosen) ?? pictures[0],
    show: setChosen,
    view,
    chooseView,
    detach: (file) => void trying(() => sendJson(linkUrl(file.id), { method: 'DELETE' })),
    relink,
    problem,
  };
}
