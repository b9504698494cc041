/** What an id of the API may name. */
export type IdKind =
  | 'shop'
  | 'member'
  | 'session'
  | 'design'
  | 'batch'
  | 'route'
  | 'override'
  | 'customer'
  | 'order'
  | 'line'
  | 'screen'
  | 'key';

/** The API's id of a row: the kind and the row's uuid without its hyphens. Opaque to clients. */
export function globalId(kind: IdKind, id: string): string {
  return `${kind}_${id.replaceAll('-', '')}`;
}

/** The row's uuid, or null when the text is not an id of that kind. */
export function localId(kind: IdKind, id: string): string | null {
  const match =
    /^([a-z]+)_([0-9a-f]{8})([0-9a-f]{4})([0-9a-f]{4})([0-9a-f]{4})([0-9a-f]{12})$/.exec(id);
  if (!match || match[1] !== kind) return null;
  return match.slice(2).join('-');
}
