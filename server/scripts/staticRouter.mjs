// Stands in for expo-router where the front page is written as plain HTML: there is no navigation then, only addresses.
import { cloneElement } from 'react';

/** A router's link as a plain one: its child with the address. */
export const Link = ({ href, children }) => cloneElement(children, { href });

/** The page that is being written. */
export const usePathname = () => '/';
