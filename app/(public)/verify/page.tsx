import { VerifyPage } from '@/components/verify/verify-page';

export default async function Verify({ searchParams }: { searchParams: Promise<{ number?: string; check?: string }> }) {
  const { number = '', check = '' } = await searchParams;
  return <VerifyPage number={number} check={check} />;
}
