import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { questionsAbout, type Question } from '@/lib/commissioning/suspicion';

const meter = { rangeLow: 0, rangeHigh: 200, calibrationDueOn: '2027-03-14', isOverdue: false };
const base = { designFlowLs: 0.2, pumpShutOffKpa: 120, instrument: meter };
const codes = (questions: Question[]) => questions.map(({ code }) => code);
const aboutFlow = (flowLs: number) => questionsAbout({ ...base, flowLs, measured: { method: 'direct-flow', flowLs } });
const aboutDrop = (dropKpa: number, flowLs = 0.21) =>
  questionsAbout({ ...base, flowLs, measured: { method: 'valve-drop', settingTurns: 2, dropKpa } });

describe('the questions before a reading is kept', () => {
  it('are none for a plausible reading', () => {
    expect(aboutFlow(0.21)).toEqual([]);
    expect(aboutDrop(8)).toEqual([]);
  });

  // Ratios of units (domain facts, section 6: 3.6, 10, 3.16, 15.85 gpm, 1.156 Cv/Kv, 6.895).
  it.each([
    [3.6, /m³\/h/],
    [15.85, /gpm/],
    [10, /decimal point/],
    [0.1, /decimal point/],
    [3.4, /m³\/h/],
  ])('name the unit where a direct flow is %d times design', (ratio, words) => {
    const [question] = aboutFlow(0.2 * ratio);
    expect(question?.code).toBe('unit');
    expect(question?.message).toMatch(words);
  });

  it.each([
    [Math.sqrt(10), /mbar/],
    [Math.sqrt(6.895), /psi/],
    [1 / Math.sqrt(6.895), /psi/],
    [1.156, /Cv/],
  ])('name the unit where the flow across a valve is %d times design', (ratio, words) => {
    const [question] = aboutDrop(8, 0.2 * ratio);
    expect(question?.code).toBe('unit');
    expect(question?.message).toMatch(words);
  });

  it('do not take an ordinary high flow for a wrong unit', () => {
    expect(codes(aboutDrop(8, 0.2 * 1.3))).toEqual([]);
    expect(codes(aboutFlow(0.2 * 1.5))).toEqual([]);
  });

  it('ask about a signal under 1 kPa, one of 1 to 3 kPa, and one that no pump here can give', () => {
    expect(codes(aboutDrop(0.9))).toEqual(['unreliable-signal']);
    expect(codes(aboutDrop(1))).toEqual(['low-signal']);
    expect(codes(aboutDrop(2.9))).toEqual(['low-signal']);
    expect(codes(aboutDrop(3))).toEqual([]);
    expect(codes(aboutDrop(121))).toEqual(['above-shut-off']);
  });

  it('ask about a flow that is design to the hundredth', () => {
    expect(codes(aboutFlow(0.2))).toEqual(['equal-to-design']);
    expect(codes(aboutFlow(0.2002))).toEqual([]);
  });

  it('ask about a meter that is overdue, has no date, or is outside its range', () => {
    const flow = { ...base, flowLs: 0.21, measured: { method: 'direct-flow', flowLs: 0.21 } as const };
    expect(codes(questionsAbout({ ...flow, instrument: { ...meter, isOverdue: true } }))).toEqual(['overdue']);
    expect(codes(questionsAbout({ ...flow, instrument: { ...meter, calibrationDueOn: null } }))).toEqual(['no-certificate']);
    expect(codes(questionsAbout({ ...flow, instrument: { ...meter, rangeLow: 0.5 } }))).toEqual(['out-of-range']);
    expect(codes(questionsAbout({ ...flow, instrument: { ...meter, rangeHigh: 0.1 } }))).toEqual(['out-of-range']);
  });

  it('never fail, whatever was typed', () => {
    const any = fc.double({ min: 0, max: 1e5, noNaN: true });
    fc.assert(
      fc.property(any, any, (dropKpa, flowLs) => {
        for (const { message } of aboutDrop(dropKpa, flowLs)) expect(message).not.toMatch(/NaN|undefined|Infinity/);
      }),
    );
  });
});
