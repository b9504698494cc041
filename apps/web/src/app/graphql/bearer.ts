import { Injectable, signal } from '@angular/core';

/** The token of a paired display. Browsers of people carry a cookie instead and leave this null. */
@Injectable({ providedIn: 'root' })
export class Bearer {
  readonly token = signal<string | null>(null);
}
