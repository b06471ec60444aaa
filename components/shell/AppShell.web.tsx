import CircleUser from 'lucide-react-native/icons/circle-user';
import LayoutList from 'lucide-react-native/icons/layout-list';
import { Link, usePathname, type Href } from 'expo-router';
import type { ReactElement, ReactNode } from 'react';
import { isWithin, type NavigationItem } from '@/components/shell/navigation';
import { SkipLink } from '@/components/shell/SkipLink';
import { Anchor } from '@/components/ui/Anchor';
import { Icon } from '@/components/ui/Icon';
import { Logo } from '@/components/ui/Logo';

export interface AppShellProps {
  /** The places of this part of the product: `yardNavigation(yardId)`, or none on the list of yards. */
  items?: readonly NavigationItem[];
  /** What the items belong to, such as the yard's name; stands above them on a wide page. */
  itemsTitle?: string;
  /** Stands above everything, such as the demonstration clock. */
  top?: ReactNode;
  children: ReactNode;
}

const general: readonly NavigationItem[] = [
  { href: '/yards', label: 'All yards', icon: LayoutList },
  { href: '/account', label: 'Account', icon: CircleUser },
];

function Place({ item, path }: { item: NavigationItem; path: string }): ReactElement {
  const exact = item.href === ('/yards' as Href);
  const here = exact ? path === item.href : isWithin(path, item.href);
  return (
    <li>
      <Link href={item.href} asChild>
        <Anchor className="d-place" aria-current={here ? 'page' : undefined}>
          <Icon icon={item.icon} size={24} />
          <span>{item.label}</span>
        </Anchor>
      </Link>
    </li>
  );
}

/**
 * Frame of everything behind the sign-in. On a phone the places are a bar at the bottom and the general ones a small line on top; from 900 px
 * all of them stand in a rail at the left. The page itself scrolls, so the browser's own bars can hide and "back" finds its place.
 */
export function AppShell({ items = [], itemsTitle, top, children }: AppShellProps): ReactElement {
  const path = usePathname();
  return (
    <div className="d-app" data-bar={items.length > 0 ? '' : undefined}>
      <SkipLink />
      {top !== undefined && <div className="d-app-top">{top}</div>}
      <div className="d-app-frame">
        <header className="d-rail">
          <Link href="/" asChild>
            <Anchor className="d-rail-logo" aria-label="Dapple">
              <Logo />
            </Anchor>
          </Link>
          {items.length > 0 && (
            <nav className="d-places" aria-label={itemsTitle ?? 'Yard'}>
              {itemsTitle !== undefined && <p className="d-rail-title">{itemsTitle}</p>}
              <ul>{items.map((item) => <Place key={item.label} item={item} path={path} />)}</ul>
            </nav>
          )}
          <nav className="d-general" aria-label="Dapple">
            <ul>{general.map((item) => <Place key={item.label} item={item} path={path} />)}</ul>
          </nav>
        </header>
        <div className="d-app-main">{children}</div>
      </div>
    </div>
  );
}
