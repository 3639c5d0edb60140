import type { Metadata } from 'next';
import { CheckForm } from '@/components/check/check-form';
import { Door } from '@/components/ui/door';

export const metadata: Metadata = { title: 'Check a plan' };

export default function CheckPage() {
  return (
    <Door title="Was the plan changed?">
      <p>At sealing a number was published: the SHA-256 of one file with the whole plan. Take the file and hold it against the number, here or with <code>sha256sum</code>.</p>
      <CheckForm commitment="" />
    </Door>
  );
}
