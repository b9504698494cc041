import {
  booleanAttribute,
  ChangeDetectionStrategy,
  Component,
  computed,
  input,
} from '@angular/core';
import { drawSwatch, SWATCH_SIZE } from '#shared/designs/swatch';

/** What a swatch needs of a design; lengths as the API gives them, decimal strings of nanometres. */
export interface SwatchDesign {
  readonly id: string;
  readonly name: string;
  readonly slices: number;
  readonly strips: readonly { readonly species: string; readonly width: string }[];
}

/** A design's end grain: its face on cards, screens and pages. As large as its host, which is 44 px unless set. */
@Component({
  selector: 'app-swatch',
  template: `
    <svg
      [attr.viewBox]="box"
      preserveAspectRatio="none"
      [attr.role]="decorative() ? null : 'img'"
      [attr.aria-label]="decorative() ? null : 'End grain of ' + design().name"
      [attr.aria-hidden]="decorative() ? true : null"
    >
      @for (fill of drawing().fills; track fill.tone) {
        <path [attr.d]="fill.d" [attr.fill]="fill.tone" />
      }
      <path class="rings" [attr.d]="drawing().rings" />
    </svg>
  `,
  styles: `
    :host {
      display: block;
      flex: none;
      width: 44px;
      height: 44px;
      border-radius: 4px;
      overflow: hidden;
    }
    svg {
      display: block;
      width: 100%;
      height: 100%;
    }
    .rings {
      fill: none;
      stroke: var(--ct-ring);
      stroke-opacity: 0.17;
      stroke-width: 1.2;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class Swatch {
  readonly design = input.required<SwatchDesign>();
  /** Set it where the design's name stands beside the swatch anyway. */
  readonly decorative = input(false, { transform: booleanAttribute });

  protected readonly box = `0 0 ${SWATCH_SIZE} ${SWATCH_SIZE}`;
  protected readonly drawing = computed(() => {
    const { strips, slices, id } = this.design();
    return drawSwatch(
      strips.map((strip) => ({ species: strip.species, width: BigInt(strip.width) })),
      slices,
      id,
    );
  });
}
