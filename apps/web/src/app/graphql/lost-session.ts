import { Injectable } from '@angular/core';
import { Subject } from 'rxjs';

/** Tells whoever cares that the server no longer knows this browser's session. */
@Injectable({ providedIn: 'root' })
export class LostSession {
  private readonly happened = new Subject<void>();
  readonly happened$ = this.happened.asObservable();

  tell(): void {
    this.happened.next();
  }
}
