/** The columns of a request without a slot. */
export const noSlot = { scannerId: null, slotStartsAt: null, slotEndsAt: null } as const
