/** A setting as it is set: turns of a valve, per cent of full speed of a pump. */
export function settingWords(kind: 'balancingValve' | 'pump', setting: number): string {
  return kind === 'pump' ? `${(100 * setting).toFixed(1)} %` : `${Number(setting.toFixed(2))} turns`;
}
