import { DOCUMENT, effect, inject, Injectable, signal } from '@angular/core';

export const SCHEMES = ['auto', 'light', 'dark'] as const;
export type Scheme = (typeof SCHEMES)[number];

const KEY = 'clamptide.scheme';

/** Light, dark, or as the device has it; kept in this browser. */
@Injectable({ providedIn: 'root' })
export class SchemeChoice {
  private readonly root = inject(DOCUMENT).documentElement;
  readonly chosen = signal<Scheme>(read());

  constructor() {
    effect(() => {
      const scheme = this.chosen();
      if (scheme === 'auto') this.root.removeAttribute('data-scheme');
      else this.root.setAttribute('data-scheme', scheme);
    });
  }

  choose(scheme: Scheme): void {
    this.chosen.set(scheme);
    try {
      localStorage.setItem(KEY, scheme);
    } catch {
      // A browser that keeps nothing still shows the choice until the page is left.
    }
  }
}

function read(): Scheme {
  try {
    const kept = localStorage.getItem(KEY);
    return SCHEMES.find((scheme) => scheme === kept) ?? 'auto';
  } catch {
    return 'auto';
  }
}
