import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { TerminalUnit } from '@/lib/network/drawing';
import { applyEdits, type CellEdit } from '@/lib/network/schedule-edits';
import { typedWords } from '@/lib/network/schedule-entry';
import { pipeTable } from '@/lib/network/schedule-pipes';
import { pumpTable, sourceTable } from '@/lib/network/schedule-plant';
import { scheduleOf } from '@/lib/network/schedule-rows';
import { terminalTable } from '@/lib/network/schedule-terminals';
import { noValveOffer, valveOfferOf } from '@/lib/network/schedule-valve-offer';
import { unitsOf, type Quantity } from '@/lib/units/quantities';
import { ladder } from '../../make/drawing';

const drawn = ladder([0.2, 0.3, 0.25]);
const unsolved = { solve: null, balance: null };
const unit = (drawing: typeof drawn, id: string) => drawing.equipment.find((piece) => piece.id === id) as TerminalUnit;

const edited = (edits: CellEdit[], units: Record<string, string> = {}) => {
  const answer = applyEdits(drawn, terminalTable, edits, units);
  if (!answer.ok) throw new Error(answer.faults.map(({ message }) => message).join(' '));
  return answer.drawing;
};
const faults = (edits: CellEdit[], units: Record<string, string> = {}) => {
  const answer = applyEdits(drawn, terminalTable, edits, units);
  return answer.ok ? [] : answer.faults.map(({ id, key, message }) => `${id} ${key}: ${message}`);
};

describe('typing into a cell', () => {
  it('takes a figure in the unit of the column, or in its own', () => {
    expect(unit(edited([{ id: 'FC-1', key: 'design', text: '0,35' }]), 'FC-1').designFlowLs).toBe(0.35);
    expect(unit(edited([{ id: 'FC-1', key: 'design', text: '12 gpm' }]), 'FC-1').designFlowLs).toBeCloseTo(0.757082, 6);
    expect(unit(edited([{ id: 'FC-1', key: 'design', text: '3.6' }], { flow: 'm³/h' }), 'FC-1').designFlowLs).toBeCloseTo(1, 12);
  });

  it('leaves a figure out where the drawing may lack it, and every other row as the same object', () => {
    const after = edited([{ id: 'FC-2', key: 'load', text: '' }]);
    expect(unit(after, 'FC-2').loadKw).toBeNull();
    expect(unit(after, 'FC-1')).toBe(unit(drawn, 'FC-1'));
    expect(after.pipes).toBe(drawn.pipes);
  });

  it('refuses what the drawing would refuse, and says why', () => {
    expect(faults([{ id: 'FC-1', key: 'design', text: '0' }])).toEqual(['FC-1 design: Above 0 L/s.']);
    expect(faults([{ id: 'FC-1', key: 'design', text: 'much' }])).toEqual(['FC-1 design: “much” is not a number.']);
    expect(faults([{ id: 'FC-1', key: 'tag', text: ' ' }])).toEqual(['FC-1 tag: Every row needs a tag.']);
    expect(faults([{ id: 'FC-1', key: 'tag', text: 'x'.repeat(41) }])).toEqual(['FC-1 tag: Longer than 40 characters.']);
    expect(faults([{ id: 'FC-1', key: 'flow', text: '1' }])).toEqual([
      'FC-1 flow: Flow now is not typed here: it follows from the drawing.',
    ]);
    expect(faults([{ id: 'gone', key: 'load', text: '1' }])).toEqual(['gone load: It is no longer on the drawing.']);
  });

  it('a block with one faulty cell changes nothing and names that cell alone', () => {
    const edits = [
      { id: 'FC-1', key: 'design', text: '0.4' },
      { id: 'FC-2', key: 'design', text: 'x' },
      { id: 'FC-3', key: 'design', text: '0.5' },
    ];
    expect(applyEdits(drawn, terminalTable, edits, {})).toMatchObject({
      ok: false,
      faults: [{ id: 'FC-2', head: 'Design flow', text: 'x' }],
    });
  });
});

describe('choosing', () => {
  it('a valve of another row or a generic one by its name; it then stands open', () => {
    const [own] = valveOfferOf(drawn).names;
    const after = edited([{ id: 'FC-1', key: 'valve', text: 'Generic DN25, fixed orifice' }]);
    expect(unit(after, 'FC-1').balancingValve).toMatchObject({ name: 'Generic DN25, fixed orifice', settingTurns: null });
    const back = applyEdits(after, terminalTable, [{ id: 'FC-1', key: 'valve', value: own }], {});
    expect(back.ok && unit(back.drawing, 'FC-1').balancingValve!.kvTable).toEqual(unit(drawn, 'FC-1').balancingValve!.kvTable);
  });

  it('a valve and where it stands in one block, each checked against the valve that was chosen', () => {
    const after = edited([
      { id: 'FC-1', key: 'stands', text: '7.5' },
      { id: 'FC-1', key: 'valve', text: 'Generic DN65, fixed orifice' },
    ]);
    expect(unit(after, 'FC-1').balancingValve).toMatchObject({ name: 'Generic DN65, fixed orifice', settingTurns: 7.5 });
    expect(
      faults([
        { id: 'FC-1', key: 'stands', text: '7.5' },
        { id: 'FC-1', key: 'valve', text: 'Generic DN25, fixed orifice' },
      ]),
    ).toEqual(['FC-1 stands: From 0.5 to 4 turns, or open.']);
  });

  it('the valve that is there already, which stays where it stands', () => {
    const set = edited([{ id: 'FC-1', key: 'stands', text: '1' }]);
    const own = valveOfferOf(set).nameOf(unit(set, 'FC-1').balancingValve!);
    const again = applyEdits(set, terminalTable, [{ id: 'FC-1', key: 'valve', text: own }], {});
    expect(again.ok && unit(again.drawing, 'FC-1').balancingValve).toMatchObject({ settingTurns: 1 });
  });

  it('a valve of the catalogue, which renames none of the drawing: its new table under an old name is told apart by a number', () => {
    const own = unit(drawn, 'FC-1').balancingValve!;
    const plain = {
      name: 'Own DN20',
      kvTable: [
        { setting: 1, kv: 1.2 },
        { setting: 4, kv: 5.7 },
      ],
      stepTurns: 0.1,
    };
    const newer = { ...plain, name: own.name };
    const catalogue = [plain, newer, { name: own.name, kvTable: own.kvTable.map((point) => ({ ...point })) }];
    const offer = valveOfferOf(drawn, catalogue);
    expect(offer.nameOf(own)).toBe(valveOfferOf(drawn).nameOf(own));
    expect(offer.names.filter((name) => name.startsWith(own.name)).length).toBe(
      valveOfferOf(drawn).names.filter((name) => name.startsWith(own.name)).length + 1,
    );
    const edits: CellEdit[] = [
      { id: 'FC-1', key: 'valve', text: 'own dn20' },
      { id: 'FC-2', key: 'valve', value: offer.nameOf({ ...own, kvTable: newer.kvTable }) },
    ];
    expect(applyEdits(drawn, terminalTable, edits, {}).ok).toBe(false);
    const after = applyEdits(drawn, terminalTable, edits, {}, catalogue);
    expect(after.ok && unit(after.drawing, 'FC-1').balancingValve).toMatchObject({ ...plain, settingTurns: null });
    expect(after.ok && unit(after.drawing, 'FC-2').balancingValve).toMatchObject({ ...newer, settingTurns: null });
  });

  it('no balancing valve at all, after which there is nothing to set', () => {
    const after = edited([{ id: 'FC-1', key: 'valve', text: 'none' }]);
    expect(unit(after, 'FC-1').balancingValve).toBeNull();
    const refused = applyEdits(after, terminalTable, [{ id: 'FC-1', key: 'stands', text: '2' }], {});
    expect(refused).toMatchObject({ ok: false, faults: [{ message: 'There is no balancing valve here; choose one first.' }] });
  });

  it('a series and a size of it for a pipe brings its bore; a bore is typed only where it is free', () => {
    const id = drawn.pipes[0].id;
    const sized = applyEdits(
      drawn,
      pipeTable,
      [
        { id, key: 'size', text: '50' },
        { id, key: 'series', text: 'steel-en10255-medium' },
      ],
      {},
    );
    expect(sized.ok && sized.drawing.pipes[0]).toMatchObject({ series: 'steel-en10255-medium', nominal: 'DN50', boreMm: 53.1 });
    if (!sized.ok) return;
    expect(applyEdits(sized.drawing, pipeTable, [{ id, key: 'bore', text: '20' }], {}).ok).toBe(false);
    const free = applyEdits(
      sized.drawing,
      pipeTable,
      [
        { id, key: 'bore', text: '20' },
        { id, key: 'series', text: 'Free bore' },
      ],
      {},
    );
    expect(free.ok && free.drawing.pipes[0]).toMatchObject({ series: null, nominal: null, boreMm: 20 });
  });

  it('plain words for pumps and sources', () => {
    const pump = applyEdits(drawn, pumpTable, [{ id: 'P-1', key: 'speed', text: '85 %' }], {});
    expect(pump.ok && pump.drawing.equipment.find(({ id }) => id === 'P-1')).toMatchObject({ speed: 0.85 });
    const source = applyEdits(drawn, sourceTable, [{ id: 'CH-1', key: 'kind', text: 'Heat exchanger' }], {});
    expect(source.ok && source.drawing.equipment.find(({ id }) => id === 'CH-1')).toMatchObject({ sourceKind: 'heat-exchanger' });
  });
});

it('what is typed in any unit is what the cell is edited with again', () => {
  const columns: [string, Quantity][] = [
    ['load', 'power'],
    ['design', 'flow'],
    ['coilDrop', 'pressure'],
    ['kvs', 'valveCoefficient'],
  ];
  fc.assert(
    fc.property(
      fc
        .constantFrom(...columns)
        .chain(([key, quantity]) => fc.tuple(fc.constant(key), fc.constant(quantity), fc.constantFrom(...unitsOf(quantity)))),
      fc.integer({ min: 1, max: 9_999_999 }),
      fc.integer({ min: 0, max: 5 }),
      ([key, quantity, unitName], digits, decimals) => {
        const text = String(digits / 10 ** decimals);
        const units = { [quantity]: unitName };
        const after = edited([{ id: 'FC-1', key, text }], units);
        const row = scheduleOf(after, unsolved).terminals[0];
        const column = terminalTable.columns.find((it) => it.key === key)!;
        expect(typedWords(column, row, units, { valves: noValveOffer })).toBe(text);
      },
    ),
  );
});
