'use client';

const oneYearS = 31_536_000;

/** Keeps a choice of this workstation (palette, language) for a year, for the server to read at the next page. */
export function keepChoice(cookie: string, value: string): void {
  document.cookie = `${cookie}=${encodeURIComponent(value)}; Path=/; Max-Age=${oneYearS}; SameSite=Lax`;
}
