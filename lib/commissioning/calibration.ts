interface Calibrated {
  /** Last day on which the certificate holds, YYYY-MM-DD; null where none is recorded. */
  calibrationDueOn: string | null;
}

/** Whether an instrument's certificate had run out when a reading was taken: from the day after it is due, by the calendar of UTC. */
export const isOverdue = ({ calibrationDueOn }: Calibrated, at: Date): boolean =>
  calibrationDueOn !== null && at.toISOString().slice(0, 10) > calibrationDueOn;
