import { useCallback, useState } from 'react';
import type { Mark } from './marks';

const most = 200;
type Marks = readonly Mark[];

export interface History {
  /** Hands on a new list and remembers the present one. */
  change: (next: Marks) => void;
  undo: () => void;
  redo: () => void;
  canUndo: boolean;
  canRedo: boolean;
}

/** Undo and redo over marks that belong to the page: every step is handed on like any other change. */
export function useHistory(marks: Marks, onMarksChange: (marks: Marks) => void): History {
  const [past, setPast] = useState<readonly Marks[]>([]);
  const [future, setFuture] = useState<readonly Marks[]>([]);
  const change = useCallback(
    (next: Marks) => {
      setPast([...past.slice(-most), marks]);
      setFuture([]);
      onMarksChange(next);
    },
    [past, marks, onMarksChange],
  );
  const undo = useCallback(() => {
    const before = past.at(-1);
    if (!before) return;
    setPast(past.slice(0, -1));
    setFuture([marks, ...future]);
    onMarksChange(before);
  }, [past, future, marks, onMarksChange]);
  const redo = useCallback(() => {
    const [after, ...rest] = future;
    if (!after) return;
    setPast([...past, marks]);
    setFuture(rest);
    onMarksChange(after);
  }, [past, future, marks, onMarksChange]);
  return { change, undo, redo, canUndo: past.length > 0, canRedo: future.length > 0 };
}
