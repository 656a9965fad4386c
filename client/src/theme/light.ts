import { useCallback, useEffect, useState } from 'react';

/** Day is for planning, lamp for the room at night. */
export type Light = 'day' | 'lamp';

/** Where a light is chosen for: planning pages and the phone in the room keep separate choices. */
export type Place = 'desk' | 'phone';

const systemIsDark = '(prefers-color-scheme: dark)';
const keyOf = (place: Place) => `pegwell-light-${place}`;

function chosen(place: Place): Light | null {
  try {
    const stored = localStorage.getItem(keyOf(place));
    return stored === 'day' || stored === 'lamp' ? stored : null;
  } catch {
    // Storage may be closed to pages (private windows); the default still holds.
    return null;
  }
}

/** The same rule as public/light.js: the reader's choice, else lamp for the phone, else the system's. */
export function lightFor(place: Place): Light {
  const choice = chosen(place);
  if (choice) return choice;
  return place === 'phone' || matchMedia(systemIsDark).matches ? 'lamp' : 'day';
}

function show(light: Light): void {
  document.documentElement.dataset['light'] = light;
  const ground = getComputedStyle(document.documentElement).getPropertyValue('--ground').trim();
  document.querySelector('meta[name="theme-color"]')?.setAttribute('content', ground || '#15100C');
}

/** The light of this part of the application, and how to change it. Follows the system until chosen. */
export function useLight(place: Place): readonly [Light, (light: Light) => void] {
  const [light, setLight] = useState(() => lightFor(place));

  useEffect(() => show(light), [light]);

  useEffect(() => {
    const system = matchMedia(systemIsDark);
    const follow = () => setLight(lightFor(place));
    system.addEventListener('change', follow);
    return () => system.removeEventListener('change', follow);
  }, [place]);

  const choose = useCallback(
    (next: Light) => {
      try {
        localStorage.setItem(keyOf(place), next);
      } catch {
        // Not kept then; it still holds until the page is closed.
      }
      setLight(next);
    },
    [place],
  );
  return [light, choose];
}
