import Link from 'next/link';
import { Door } from '@/components/ui/door';

export default function NotFound() {
  return (
    <Door title="Nothing here">
      <p>There is nothing at this address, or it is not yours to see.</p>
      <p><Link href="/">Go to your cellar</Link> or <Link href="/j">join a session</Link>.</p>
    </Door>
  );
}
