import type { CorrectionRequest } from '#shared/schemas/act'

/** Puts another act in place of one, under a key of its own. Throws as `$fetch` does; `useSubmit` reads the refusal. */
export function sendCorrection(actId: number, change: Omit<CorrectionRequest, 'clientKey'>): Promise<{ actId: number }> {
  const path: string = `/api/acts/${actId}/correct`
  return callApi<{ actId: number }>(path, { method: 'POST', body: { clientKey: newClientKey(), ...change } })
}
