import { afterNextRender, type Injector } from '@angular/core';

/** Once the problems are shown, takes the person to the first field that has one. */
export function focusFirstProblem(form: HTMLElement, injector: Injector): void {
  afterNextRender(
    { read: () => form.querySelector<HTMLElement>('[aria-invalid="true"]')?.focus() },
    { injector },
  );
}
