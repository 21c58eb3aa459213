import type { KeyboardEvent } from 'react';

/** Enter goes to the next field to fill in, as on a keypad; Shift and Enter goes back. Fields carry `data-next`. */
export function goOn(event: KeyboardEvent<HTMLInputElement>): void {
  if (event.key !== 'Enter') return;
  event.preventDefault();
  const fields = [...document.querySelectorAll<HTMLInputElement>('[data-next]')];
  const next = fields[fields.indexOf(event.currentTarget) + (event.shiftKey ? -1 : 1)];
  next?.focus();
  next?.select();
}
