import { cleanup, configure } from '@testing-library/react';
import { afterEach, beforeEach, vi } from 'vitest';

// Pages are loaded when they are gone to; the first one brings its libraries with it.
configure({ asyncUtilTimeout: 8_000 });

afterEach(() => {
  cleanup();
  vi.unstubAllGlobals();
  localStorage.clear();
});

// jsdom has no layout: pages see a wide window that never changes.
Object.defineProperty(window, 'matchMedia', {
  writable: true,
  value: (query: string) => ({
    matches: false,
    media: query,
    addEventListener: () => undefined,
    removeEventListener: () => undefined,
  }),
});

beforeEach(() => {
  vi.stubGlobal(
    'ResizeObserver',
    class {
      observe() {
        // Nothing ever changes its size here.
      }
      disconnect() {
        // Nothing to let go.
      }
      unobserve() {
        // Nothing to let go.
      }
    },
  );
});

window.scrollTo = () => undefined;
Element.prototype.scrollTo = () => undefined;
