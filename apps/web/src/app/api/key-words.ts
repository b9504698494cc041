import type { ApiKeyFieldsFragment, ApiScope } from '../graphql/generated/graphql';

export const SCOPES: readonly ApiScope[] = ['ORDERS_READ', 'CUSTOMERS_READ'];

/** "read orders" */
export function scopeName(scope: ApiScope): string {
  switch (scope) {
    case 'ORDERS_READ':
      return 'read orders';
    case 'CUSTOMERS_READ':
      return 'read customers';
  }
}

export function scopeMeaning(scope: ApiScope): string {
  switch (scope) {
    case 'ORDERS_READ':
      return 'Orders, their status, stage, progress and forecast.';
    case 'CUSTOMERS_READ':
      return 'The customers of orders: names and e-mail addresses.';
  }
}

/** Whether a key still works at an instant in milliseconds, and if not, why. */
export function keyState(
  key: Pick<ApiKeyFieldsFragment, 'revokedAt' | 'expiresAt'>,
  now: number,
): 'works' | 'revoked' | 'run out' {
  if (key.revokedAt !== null) return 'revoked';
  return key.expiresAt !== null && Date.parse(key.expiresAt) <= now ? 'run out' : 'works';
}

/** A first request, to be pasted into a shell in which the key stands in CLAMPTIDE_KEY. */
export function curlExample(origin: string): string {
  const body = JSON.stringify({
    query:
      'query Order($code: String!) { order(code: $code) { code status stage progressPercent forecastReadyAt onTime } }',
    variables: { code: 'OR-1001' },
  });
  return [
    `curl ${origin}/graphql \\`,
    `  -H "Authorization: Bearer $CLAMPTIDE_KEY" \\`,
    `  -H "Content-Type: application/json" \\`,
    `  -d '${body}'`,
  ].join('\n');
}
