import { noAnswerType, notAProblemType, ProblemError, type Problem } from '@/components/ui/problem';
import type { EvidenceFile, EvidenceRole } from '@/services/contracts/evidence';

export interface FileSending {
  readonly answer: Promise<EvidenceFile>;
  /** Stops it; the answer is refused with a DOMException named AbortError. */
  readonly cancel: () => void;
}

function problemIn(request: XMLHttpRequest): Problem {
  try {
    const found = JSON.parse(request.responseText) as Partial<Problem>;
    if (typeof found.title === 'string' && typeof found.status === 'number') return found as Problem;
  } catch {
    // Something between here and the server answered; what it says is no problem document.
  }
  return { type: notAProblemType, title: '', status: request.status, detail: `${String(request.status)} ${request.statusText}` };
}

/** Streams a file to the store and tells how far it is, in percent. Refused with ProblemError for whatever went wrong. */
export function sendFile(role: EvidenceRole, file: File, onProgress: (percent: number) => void): FileSending {
  const request = new XMLHttpRequest();
  const answer = new Promise<EvidenceFile>((done, refuse) => {
    request.open('POST', `/api/evidence?kind=${role}&name=${encodeURIComponent(file.name)}`);
    request.upload.onprogress = ({ loaded, total }) => onProgress(Math.floor((100 * loaded) / Math.max(1, total)));
    request.onabort = () => refuse(new DOMException('stopped', 'AbortError'));
    request.onerror = () => refuse(new ProblemError({ type: noAnswerType, title: '', status: 0 }));
    request.onload = () => {
      if (request.status >= 200 && request.status < 300) done(JSON.parse(request.responseText) as EvidenceFile);
      else refuse(new ProblemError(problemIn(request)));
    };
    request.send(file);
  });
  return { answer, cancel: () => request.abort() };
}
