import type { FetchOptions } from 'ofetch'

type PlainFetch = (path: string, options?: FetchOptions) => Promise<unknown>

/**
 * Asks one of our own routes. The answer's type is the wire type the caller names: reckoning it from the path over all
 * routes at once is more than the type checker can do, and it then says that `$fetch` takes no type at all.
 * @throws FetchError, whose `data` carries the refusal
 */
export function callApi<Answer = unknown>(path: string, options?: FetchOptions): Promise<Answer> {
  return ($fetch as unknown as PlainFetch)(path, options) as Promise<Answer>
}
