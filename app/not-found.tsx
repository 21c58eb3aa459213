import { NothingHere } from '@/components/shell/nothing-here';

export default function NotFound() {
  return (
    <main className="mx-auto max-w-3xl p-6">
      <NothingHere />
    </main>
  );
}
