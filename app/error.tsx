'use client';

import { BrokenPage } from '@/components/shell/broken-page';

export default function Broken({ error, reset }: { error: Error & { digest?: string }; reset: () => void }) {
  return <BrokenPage digest={error.digest} again={reset} />;
}
