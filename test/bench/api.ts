/** A signed-in person, as much as a benchmark needs of one. */
export interface Signed {
  cookie: string;
  ask<Data>(query: string, variables?: Record<string, unknown>): Promise<Data>;
}

/** Sends an operation and fails on any error; also returns the session cookie that came back. */
async function post<Data>(
  url: string,
  cookie: string,
  query: string,
  variables: Record<string, unknown>,
): Promise<{ data: Data; cookie: string }> {
  const response = await fetch(`${url}/graphql`, {
    method: 'POST',
    headers: { 'content-type': 'application/json', cookie },
    body: JSON.stringify({ query, variables }),
  });
  const body = (await response.json()) as { data?: Data; errors?: { message: string }[] };
  if (!body.data || body.errors) throw new Error(JSON.stringify(body.errors));
  return { data: body.data, cookie: response.headers.get('set-cookie')?.split(';')[0] ?? cookie };
}

const SIGN_IN = `mutation ($email: String!, $password: String!) {
  signIn(email: $email, password: $password) { problems { sentence } }
}`;

export async function signIn(url: string, email: string, password: string): Promise<Signed> {
  const { cookie, data } = await post<{ signIn: { problems: { sentence: string }[] } }>(
    url,
    '',
    SIGN_IN,
    { email, password },
  );
  if (data.signIn.problems.length > 0) throw new Error(data.signIn.problems[0]?.sentence);
  return {
    cookie,
    ask: (query, variables = {}) =>
      post(url, cookie, query, variables).then(({ data: answer }) => answer as never),
  };
}
