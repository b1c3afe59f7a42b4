/**
 * Exit statuses of the command line beyond those of a result (0 to 3, `exitStatus` of sim/report): what was asked could
 * not even be begun.
 */
export const status = { done: 0, inputWrong: 3, internalError: 4 } as const;

export type Status = 0 | 1 | 2 | 3 | 4;
