import CalendarDays from 'lucide-react-native/icons/calendar-days';
import Clock from 'lucide-react-native/icons/clock';
import Droplet from 'lucide-react-native/icons/droplet';
import Fence from 'lucide-react-native/icons/fence';
import Users from 'lucide-react-native/icons/users';
import type { Href } from 'expo-router';
import type { IconComponent } from '@/components/ui/Icon';

/** One place in the navigation. */
export interface NavigationItem {
  href: Href;
  label: string;
  icon: IconComponent;
}

/** The parts of one yard. */
export function yardNavigation(yardId: string): readonly NavigationItem[] {
  const part = (name: string): Href => `/yards/${yardId}/${name}` as Href;
  return [
    { href: part('today'), label: 'Today', icon: Clock },
    { href: part('yard'), label: 'Yard', icon: Fence },
    { href: part('plan'), label: 'Plan', icon: CalendarDays },
    { href: part('water'), label: 'Water', icon: Droplet },
    { href: part('people'), label: 'People', icon: Users },
  ];
}

/** True while the page shows the item or something inside it. */
export function isWithin(path: string, href: Href): boolean {
  const target = typeof href === 'string' ? href : href.pathname;
  return path === target || path.startsWith(`${target}/`);
}
