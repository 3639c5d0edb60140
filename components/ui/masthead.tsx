'use client';

import Link from 'next/link';
import { usePathname } from 'next/navigation';
import { ModeSwitch } from './mode-switch';
import { Word } from './mark';

export interface NavItem {
  href: string;
  label: string;
}

/** The head of every desk page: mark, the cellar's screens, the cellar's name, the light. */
export function Masthead({ home, items, cellarName }: { home: string; items: NavItem[]; cellarName: string }) {
  const path = usePathname();
  const isHere = (href: string) => (href === home ? path === home : path === href || path.startsWith(`${href}/`));
  return (
    <header className="masthead">
      <Link className="brand word" href={home} aria-label="Tercet, today"><Word /></Link>
      <nav aria-label="Cellar">
        {items.map((item) => (
          <Link key={item.href} href={item.href} aria-current={isHere(item.href) ? 'page' : undefined}>{item.label}</Link>
        ))}
      </nav>
      <Link className="soft" href="/account" style={{ textDecoration: 'none' }}>{cellarName}</Link>
      <ModeSwitch />
    </header>
  );
}
