import { redirect } from 'next/navigation';
import { SignInForm } from '@/components/accounts/sign-in-form';
import { Threshold } from '@/components/shell/threshold';
import { messagesFor } from '@/components/theme/messages-for';
import { requestWorkstation } from '@/components/theme/request-workstation';
import { currentActor } from '@/services/accounts/page-actor';

export default async function SignInPage({ searchParams }: { searchParams: Promise<{ next?: string }> }) {
  if (await currentActor()) redirect('/');
  const { next } = await searchParams;
  const { locale } = await requestWorkstation();
  return (
    <Threshold title={messagesFor(locale)('accounts')('signIn')}>
      <SignInForm next={next} />
    </Threshold>
  );
}
