/** Exit statuses; the first three are answers, the others are not. */
export const STATUS = {
  done: 0,
  doesNotHold: 1,
  unusable: 2,
  cannotTell: 3,
  defect: 70,
} as const;
