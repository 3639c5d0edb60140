import { redirect } from 'next/navigation';
import { currentUser, listCellars } from '@/lib/auth/access';

/** Sends each to where the work is: one cellar, the list of cellars, or the sign-in. */
export default async function HomePage() {
  const user = await currentUser();
  if (!user) redirect('/sign-in');
  const cellars = listCellars(user);
  redirect(cellars.length === 1 ? `/c/${cellars[0]!.slug}` : '/account');
}
