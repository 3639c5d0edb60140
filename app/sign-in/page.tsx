import type { Metadata } from 'next';
import Link from 'next/link';
import { SignInForm } from '@/components/auth/sign-in-form';
import { ForgetPages } from '@/components/phone/forget-pages';
import { Door } from '@/components/ui/door';
import { safeNext } from '@/lib/auth/schema';

export const metadata: Metadata = { title: 'Sign in' };

export default async function SignInPage({ searchParams }: PageProps<'/sign-in'>) {
  const { next } = await searchParams;
  return (
    <Door title="Sign in">
      <ForgetPages which="cellar" />
      <SignInForm next={safeNext(typeof next === 'string' ? next : undefined) ?? '/'} />
      <p className="note">No password yet, or forgotten? An owner of the cellar makes you a link that sets one.</p>
      <p>Here to taste? <Link href="/j">Join a session with its code.</Link></p>
    </Door>
  );
}
