let current = new Headers();

/** Stands in for `next/headers`: what the request under test carries. */
export function setHeaders(headers: Headers): void {
  current = headers;
}

export async function headers(): Promise<Headers> {
  return current;
}
