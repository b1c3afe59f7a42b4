/** Exit status of the command line, as the file contract has it. Where 1 and 2 both hold, 2 wins. */
export const status = {
  passes: 0,
  criterionFails: 1,
  notAudited: 2,
  inputWrong: 3,
  internalError: 4,
} as const;

export type Status = (typeof status)[keyof typeof status];
