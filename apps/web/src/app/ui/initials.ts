import { ChangeDetectionStrategy, Component, input } from '@angular/core';

/** A person, as two or three letters; the whole name is read out and shown on hover. */
@Component({
  selector: 'app-initials',
  template: `<span aria-hidden="true">{{ initials() }}</span
    ><span class="ct-hidden">{{ name() }}</span>`,
  host: { '[attr.title]': 'name()' },
  styles: `
    :host {
      display: inline-grid;
      place-items: center;
      flex: none;
      min-width: 1.75em;
      height: 2em;
      padding: 0 0.2em;
      border-radius: 6px;
      background: var(--ct-shade);
      color: var(--ct-ink);
      font-size: 0.75rem;
      font-weight: 800;
      line-height: 1;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class Initials {
  readonly initials = input.required<string>();
  readonly name = input.required<string>();
}
