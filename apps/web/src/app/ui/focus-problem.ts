import { afterNextRender, DestroyRef, type Injector } from '@angular/core';

/** Once the problems are shown, takes the person to the first field that has one. */
export function focusFirstProblem(form: HTMLElement, injector: Injector): void {
  // The form did what it was for, and the page has been left.
  if (injector.get(DestroyRef).destroyed) return;
  afterNextRender(
    { read: () => form.querySelector<HTMLElement>('[aria-invalid="true"]')?.focus() },
    { injector },
  );
}
