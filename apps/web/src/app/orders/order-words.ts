import { placeWords } from '#shared/words/card-words';
import type { OrderStatus, Place } from '../graphql/generated/graphql';

/** In the order in which an order goes through them. */
export const STATUSES: readonly OrderStatus[] = [
  'RECEIVED',
  'PLANNED',
  'IN_WORK',
  'READY',
  'SHIPPED',
];

export function statusName(status: OrderStatus): string {
  switch (status) {
    case 'RECEIVED':
      return 'received';
    case 'PLANNED':
      return 'planned';
    case 'IN_WORK':
      return 'in work';
    case 'READY':
      return 'ready';
    case 'SHIPPED':
      return 'shipped';
  }
}

/** What the status means, for whoever asks. */
export function statusMeaning(status: OrderStatus): string {
  switch (status) {
    case 'RECEIVED':
      return 'No batch makes all of it yet.';
    case 'PLANNED':
      return 'Its batches wait in the queue.';
    case 'IN_WORK':
      return 'At least one of its batches is on the floor.';
    case 'READY':
      return 'All its boards are ready.';
    case 'SHIPPED':
      return 'All its boards have left the shop.';
  }
}

/** The stage that a line or an order stands in. */
export function stageName(stage: Place | null): string {
  return stage === null ? 'no batch yet' : placeWords(stage);
}

/** "1 board", "12 boards" */
export function boardCount(count: number): string {
  return count === 1 ? '1 board' : `${count} boards`;
}
