import { cookies } from 'next/headers';
import { redirect } from 'next/navigation';
import { ownPath } from '@/components/accounts/own-path';
import { SignInForm } from '@/components/accounts/sign-in-form';
import { Threshold } from '@/components/shell/threshold';
import { messagesFor } from '@/components/theme/messages-for';
import { requestWorkstation } from '@/components/theme/request-workstation';
import { currentActor } from '@/services/accounts/page-actor';
import { sessionCookieName } from '@/services/accounts/sessions';

export default async function SignInPage({ searchParams }: { searchParams: Promise<{ next?: string | string[] }> }) {
  const { next } = await searchParams;
  const wanted = typeof next === 'string' ? next : undefined;
  if (await currentActor()) redirect(ownPath(wanted));
  const { locale } = await requestWorkstation();
  // A cookie is still there but opens nothing: the session ran out or was ended elsewhere.
  const ended = (await cookies()).get(sessionCookieName) !== undefined;
  return (
    <Threshold title={messagesFor(locale)('accounts')('signIn')}>
      <SignInForm next={wanted} ended={ended} />
    </Threshold>
  );
}
