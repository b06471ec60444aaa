import { randomUUID } from 'node:crypto';
import { cleanup } from '@testing-library/react';

// jsdom has no ResizeObserver; the router's frame code and the charts need one.
globalThis.ResizeObserver ??= class {
  observe(): void {}
  unobserve(): void {}
  disconnect(): void {}
};

// jsdom has no randomUUID; every write of the client makes a key with it.
globalThis.crypto.randomUUID ??= randomUUID;

afterEach(() => {
  cleanup();
});
