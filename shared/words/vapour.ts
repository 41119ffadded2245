/** Why a setting of air and fire stays as it is. */
export const vapourRefusals = {
  stated: 'An owner has stated this already. Withdraw that first.',
} as const
