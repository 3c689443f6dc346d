import type { Workbook } from 'exceljs';
import { valvesOf, type ReportValve } from '@/lib/api/report-judgement';
import { colourVerdicts, kindWords, measuredColumns } from './measured-columns';
import { referenceOf, type ReportOnPaper } from './report-on-paper';
import { addSheet, addTable, firstRow, formats, type Column } from './sheet-table';

const stateWords = {
  open: 'fully open',
  throttled: 'throttled',
  'too-small': 'too small: open and still short of flow',
  'too-large': 'too large: at its smallest setting',
} as const;

/** All balancing valves, those of branches and mains too: what the design sets and what was measured there. */
export function addValves(workbook: Workbook, report: ReportOnPaper): void {
  const columns: Column<ReportValve>[] = [
    { key: 'tag', head: 'Tag', width: 14, content: ({ station }) => station.tag },
    { key: 'kind', head: 'Serves', width: 15, content: ({ station }) => kindWords[station.kind] },
    { key: 'storey', head: 'Storey', width: 13, content: ({ station }) => station.storey },
    { key: 'valve', head: 'Valve', width: 26, content: ({ station }) => station.valveName },
    { key: 'design', head: 'Design flow', unit: 'L/s', width: 10, format: formats.flow, content: ({ station }) => station.designFlowLs },
    { key: 'drop', head: 'Drop at design', unit: 'kPa', width: 10, format: formats.pressure, content: ({ valve }) => valve.dropKpa },
    { key: 'kv', head: 'Kv at setting', unit: 'm³/h', width: 9, format: formats.kv, content: ({ valve }) => valve.kv },
    { key: 'setting', head: 'Setting by design', unit: 'turns', width: 11, format: formats.turns, content: ({ valve }) => valve.setting },
    { key: 'state', head: 'State', width: 20, content: ({ valve }) => stateWords[valve.state] },
    ...measuredColumns<ReportValve>(report.content, ({ station }) => station),
    {
      key: 'measuredSetting',
      head: 'Setting read',
      unit: 'turns',
      width: 9,
      format: formats.turns,
      content: ({ station }) => station.reading?.settingTurns ?? null,
    },
    {
      key: 'measuredDrop',
      head: 'Drop read',
      unit: 'kPa',
      width: 10,
      format: formats.pressure,
      content: ({ station }) => station.reading?.dropKpa ?? null,
    },
  ];
  const valves = valvesOf(report.content);
  const sheet = addSheet(workbook, 'Valves', { title: 'Balancing valves', reference: referenceOf(report) });
  addTable(sheet, columns, valves);
  colourVerdicts(sheet, columns, firstRow, valves.length);
}
