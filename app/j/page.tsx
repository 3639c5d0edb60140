import type { Metadata } from 'next';
import { JoinCodeForm } from '@/components/phone/join-forms';
import { Door } from '@/components/ui/door';

export const metadata: Metadata = { title: 'Join a tasting' };

export default function JoinPage() {
  return (
    <Door title="Join a tasting">
      <p className="soft">Scan the QR code on the board with your camera, or type its digits here.</p>
      <JoinCodeForm />
    </Door>
  );
}
