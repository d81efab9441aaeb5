/** The procedures that test a whole kit. */
export const KIT_PROCEDURES = ['count', 'on-air-check'] as const
export type KitProcedure = (typeof KIT_PROCEDURES)[number]
