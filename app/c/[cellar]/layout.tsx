import { notFound, redirect } from 'next/navigation';
import { Masthead, type NavItem } from '@/components/ui/masthead';
import { accessOf, currentUser } from '@/lib/auth/access';
import { allows, type Capability } from '@/lib/auth/permissions';

const SCREENS: { path: string; label: string; capability: Capability }[] = [
  { path: '', label: 'Today', capability: 'session.list' },
  { path: '/barrels', label: 'Barrels', capability: 'cellar.view' },
  { path: '/lots', label: 'Lots', capability: 'cellar.view' },
  { path: '/sessions', label: 'Sessions', capability: 'session.list' },
  { path: '/calls', label: 'Calls', capability: 'cellar.view' },
  { path: '/lexicon', label: 'Lexicon', capability: 'cellar.view' },
  { path: '/settings', label: 'Settings', capability: 'cellar.manage' },
];

export default async function CellarLayout({ children, params }: LayoutProps<'/c/[cellar]'>) {
  const { cellar: slug } = await params;
  const user = await currentUser();
  if (!user) redirect(`/sign-in?next=/c/${encodeURIComponent(slug)}`);
  const access = accessOf(user, slug);
  if (!access) notFound();
  const home = `/c/${access.cellar.slug}`;
  const items: NavItem[] = SCREENS.filter((s) => allows(access.roles, s.capability)).map((s) => ({ href: home + s.path, label: s.label }));
  return (
    <div className="desk">
      <Masthead home={home} items={items} cellarName={access.cellar.name} />
      {children}
    </div>
  );
}
