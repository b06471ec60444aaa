// Stands in for Expo Router's tab bars and native stack (about 30 kB gzip). The frames of this app are its own (components/shell) and its
// layouts use `Slot`, so that a page that is left is gone and cannot take the focus.
import { createContext } from 'react';

function NotInBundle() {
  throw new Error('Stack and Tabs are left out of the web bundle (metro.config.js): use Slot inside a frame of components/shell.');
}
const Navigator = Object.assign(NotInBundle, { Screen: NotInBundle });

export const Tabs = Navigator;
export const ExperimentalStack = Navigator;
export const createNativeStackNavigator = () => ({ Navigator, Screen: NotInBundle, Group: NotInBundle });

// The router's own error page asks how high a tab bar is; there is none.
export const BottomTabBarHeightContext = createContext(undefined);
