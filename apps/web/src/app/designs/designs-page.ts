import { ChangeDetectionStrategy, Component, computed, inject, signal } from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { Apollo } from 'apollo-angular';
import { filter, firstValueFrom } from 'rxjs';
import { DesignsDocument, type DesignFieldsFragment } from '../graphql/generated/graphql';
import { LiveFeed } from '../graphql/live-feed';
import { Session } from '../session/session';
import { FailedPanel } from '../ui/failed-panel';
import { Icon } from '../ui/icon';
import { Skeleton } from '../ui/skeleton';
import { StatePanel } from '../ui/state-panel';
import { Swatch } from '../ui/swatch';
import { clampWords, panelWords, sizeWords, stripWords } from './design-words';
import { NewDesign } from './new-design';

/** Pixels that a board is drawn high at most. */
const FACE_HEIGHT = 168;

/** The boards that the shop makes. */
@Component({
  selector: 'app-designs-page',
  imports: [FailedPanel, Icon, NewDesign, Skeleton, StatePanel, Swatch],
  templateUrl: './designs-page.html',
  styleUrl: './designs-page.scss',
  host: { class: 'ct-page' },
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class DesignsPage {
  private readonly apollo = inject(Apollo);
  private readonly session = inject(Session);

  /** By name; null while they are read. */
  protected readonly designs = signal<readonly DesignFieldsFragment[] | null>(null);
  protected readonly failed = signal(false);
  protected readonly adding = signal(false);
  protected readonly made = signal<string | null>(null);
  protected readonly mayEdit = computed(() => this.session.may('editDesigns'));
  protected readonly unit = computed(() => this.session.viewer()?.shop.lengthUnit ?? 'MILLIMETRE');
  protected readonly skeletons = [1, 2, 3, 4, 5, 6];
  protected readonly faceHeight = FACE_HEIGHT;
  protected readonly sizeWords = sizeWords;
  protected readonly stripWords = stripWords;
  protected readonly panelWords = panelWords;
  protected readonly clampWords = clampWords;

  constructor() {
    void this.read();
    inject(LiveFeed)
      .changes$.pipe(
        filter((change) => change.shopChanged || change.reset),
        takeUntilDestroyed(),
      )
      .subscribe(() => void this.read());
  }

  protected async read(): Promise<void> {
    try {
      const { data } = await firstValueFrom(this.apollo.query({ query: DesignsDocument }));
      if (!data) throw new Error('The server gave no answer.');
      this.designs.set(data.designs);
      this.failed.set(false);
    } catch {
      this.failed.set(this.designs() === null);
    }
  }

  /** The finished board's length against its width. */
  protected proportion(design: DesignFieldsFragment): number {
    return Number(design.length) / Number(design.width);
  }

  protected designMade(design: DesignFieldsFragment): void {
    this.made.set(design.name);
    void this.read();
  }
}
