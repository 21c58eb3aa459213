import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { instantOfWall, wallTime } from '@/components/inspections/act-time';
import { DraftKeeper, type DraftServer, type ServedDraft } from '@/components/inspections/draft-keeper';
import type { DraftShelf, ShelvedDraft } from '@/components/inspections/draft-shelf';
import { pastedColumn } from '@/components/inspections/pasted-column';
import { ProblemError } from '@/components/ui/problem';
import { inspectionContent, type InspectionContent } from '@/services/contracts/inspection-content';

const changed = { name: 'Ada Quill', at: '2026-03-09T14:05:00.000000Z' };
const withNotes = (notes: string): InspectionContent => inspectionContent.parse({ notes });

/** A server that keeps one draft and can be unplugged, or lose its answers. */
class OneDraft implements DraftServer {
  held: ServedDraft = { version: 1, content: withNotes(''), changed };
  reachable = true;
  losesAnswers = false;
  saves = 0;

  save = async (content: InspectionContent, version: number): Promise<ServedDraft> => {
    await Promise.resolve();
    if (!this.reachable) throw new TypeError('Failed to fetch');
    if (version !== this.held.version)
      throw new ProblemError({ type: '/problems/changed-meanwhile', title: 'Changed meanwhile', status: 412 });
    this.saves += 1;
    this.held = { version: version + 1, content, changed };
    if (this.losesAnswers) throw new TypeError('Failed to fetch');
    return this.held;
  };

  read = async (): Promise<ServedDraft> => {
    await Promise.resolve();
    if (!this.reachable) throw new TypeError('Failed to fetch');
    return this.held;
  };
}

function shelf(): DraftShelf & { kept: ShelvedDraft | null } {
  const made = {
    kept: null as ShelvedDraft | null,
    read: () => made.kept,
    put: (draft: ShelvedDraft) => {
      made.kept = draft;
    },
    clear: () => {
      made.kept = null;
    },
  };
  return made;
}

describe('a draft on the bench', () => {
  beforeEach(() => void vi.useFakeTimers());
  afterEach(() => void vi.useRealTimers());

  it('is saved once after a pause, and then leaves the shelf', async () => {
    const [server, kept] = [new OneDraft(), shelf()];
    const keeper = new DraftKeeper(server.held, server, kept);
    keeper.change({ notes: 'a' });
    keeper.change({ notes: 'ab' });
    expect(kept.kept?.content.notes).toBe('ab');
    expect(server.saves).toBe(0);
    await vi.advanceTimersByTimeAsync(700);
    expect([server.saves, server.held.content.notes, keeper.current().saved.kind, kept.kept]).toEqual([1, 'ab', 'saved', null]);
  });

  it('is kept while the network is lost, and sent by itself when it is back', async () => {
    const [server, kept] = [new OneDraft(), shelf()];
    const keeper = new DraftKeeper(server.held, server, kept);
    server.reachable = false;
    keeper.change({ notes: 'typed in the cellar' });
    await vi.advanceTimersByTimeAsync(700);
    expect(keeper.current().saved).toMatchObject({ kind: 'unsaved', retrying: true });
    expect(kept.kept?.content.notes).toBe('typed in the cellar');
    server.reachable = true;
    await vi.advanceTimersByTimeAsync(31_000);
    expect([server.held.content.notes, keeper.current().saved.kind]).toEqual(['typed in the cellar', 'saved']);
  });

  it('does not take its own save for somebody else’s when the answer was lost', async () => {
    const server = new OneDraft();
    const keeper = new DraftKeeper(server.held, server, shelf());
    server.losesAnswers = true;
    keeper.change({ notes: 'once' });
    await vi.advanceTimersByTimeAsync(700);
    server.losesAnswers = false;
    await vi.advanceTimersByTimeAsync(31_000);
    expect([keeper.current().theirs, keeper.current().saved.kind, server.held.version]).toEqual([null, 'saved', 2]);
  });

  it('never overwrites another version without a choice, and loses neither', async () => {
    const [server, kept] = [new OneDraft(), shelf()];
    const keeper = new DraftKeeper(server.held, server, kept);
    server.held = { version: 2, content: withNotes('theirs'), changed };
    keeper.change({ notes: 'mine' });
    await vi.advanceTimersByTimeAsync(700);
    expect(keeper.current().theirs?.content.notes).toBe('theirs');
    keeper.change({ notes: 'mine, longer' });
    await vi.advanceTimersByTimeAsync(60_000);
    expect(await keeper.flush()).toBe(false);
    expect([server.held.content.notes, kept.kept?.content.notes]).toEqual(['theirs', 'mine, longer']);
    keeper.keepMine();
    await vi.advanceTimersByTimeAsync(700);
    expect([server.held.content.notes, server.held.version, keeper.current().saved.kind]).toEqual(['mine, longer', 3, 'saved']);
  });

  it('gives the other version when that is chosen', async () => {
    const server = new OneDraft();
    const keeper = new DraftKeeper(server.held, server, shelf());
    server.held = { version: 2, content: withNotes('theirs'), changed };
    keeper.change({ notes: 'mine' });
    await vi.advanceTimersByTimeAsync(700);
    keeper.takeTheirs();
    await vi.advanceTimersByTimeAsync(60_000);
    expect([keeper.current().content.notes, server.held.version]).toEqual(['theirs', 2]);
  });

  it('takes up what a closed tab left, and asks when somebody saved since', async () => {
    const [server, kept] = [new OneDraft(), shelf()];
    kept.kept = { version: 1, content: withNotes('left behind') };
    const first = new DraftKeeper(server.held, server, kept);
    first.restore(server.held);
    await vi.advanceTimersByTimeAsync(100);
    expect([server.held.content.notes, server.held.version]).toEqual(['left behind', 2]);
    kept.kept = { version: 1, content: withNotes('older still') };
    const second = new DraftKeeper(server.held, server, kept);
    second.restore(server.held);
    await vi.advanceTimersByTimeAsync(60_000);
    expect([second.current().content.notes, second.current().theirs?.content.notes, server.held.version]).toEqual([
      'older still',
      'left behind',
      2,
    ]);
  });
});

describe('what is typed and pasted', () => {
  // Offsets from the IANA time zone database: Europe/London is UTC in winter and UTC+1 from 2026-03-29 01:00 UTC.
  it('reads the plant’s wall clock in both halves of the year', () => {
    expect(instantOfWall('2026-03-09T14:05', 'Europe/London')).toBe('2026-03-09T14:05:00.000Z');
    expect(instantOfWall('2026-07-09T14:05', 'Europe/London')).toBe('2026-07-09T13:05:00.000Z');
    expect(instantOfWall('2026-10-25T01:30', 'Europe/London')).toBe('2026-10-25T00:30:00.000Z');
    expect(instantOfWall('2026-03-29T01:30', 'Europe/London')).toBe('2026-03-29T01:30:00.000Z');
    expect(wallTime('2026-03-29T01:30:00.000Z', 'Europe/London')).toBe('2026-03-29T02:30');
    expect(instantOfWall('yesterday', 'Europe/London')).toBeNull();
  });

  it('keeps a blank cell of a pasted column in its place', () => {
    expect(pastedColumn('0.91\r\n\r\n0,88\r\n')).toEqual(['0.91', '', '0,88']);
  });
});
