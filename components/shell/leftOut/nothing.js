// Stands in for modules of which no screen uses anything: what a barrel exports from here is undefined.
export {};
