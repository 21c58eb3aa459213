import type { InspectionContent } from '@/services/contracts/inspection-content';

/** What a browser keeps of a draft until the server has it. */
export interface ShelvedDraft {
  readonly version: number;
  readonly content: InspectionContent;
}

export interface DraftShelf {
  readonly read: () => ShelvedDraft | null;
  readonly put: (draft: ShelvedDraft) => void;
  readonly clear: () => void;
}

/**
 * The browser's own store for one draft of one person: another person at the same workstation never gets it. A full or
 * forbidden store is no fault of the work: it goes on, only without this safety.
 */
export function browserShelf(inspection: string, person: string): DraftShelf {
  const key = `ringtrue-draft-${inspection}-${person}`;
  const trying = <Answer>(work: () => Answer): Answer | null => {
    try {
      return work();
    } catch {
      return null;
    }
  };
  return {
    read: () => trying(() => JSON.parse(window.localStorage.getItem(key) ?? 'null') as ShelvedDraft | null),
    put: (draft) => void trying(() => window.localStorage.setItem(key, JSON.stringify(draft))),
    clear: () => void trying(() => window.localStorage.removeItem(key)),
  };
}
