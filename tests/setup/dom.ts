import { cleanup } from '@testing-library/react';

// jsdom has no ResizeObserver; the router's frame code and the charts need one.
globalThis.ResizeObserver ??= class {
  observe(): void {}
  unobserve(): void {}
  disconnect(): void {}
};

afterEach(() => {
  cleanup();
});
