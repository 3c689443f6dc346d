/** A schedule to try with, of our own invention: two storeys of fan coils, one flow left to be worked out from its load. */
export const exampleScheduleName = 'terminal-schedule-example.csv';

const rows = [
  ['Tag', 'Storey', 'Riser', 'Room', 'Load (kW)', 'Flow (L/s)', 'Coil drop (kPa)', 'Supply (°C)', 'Return (°C)'],
  ['FC-1.01', 'Level 1', 'A', '1.02 Reading room', '4.2', '0.167', '14', '6', '12'],
  ['FC-1.02', 'Level 1', 'A', '1.03 Reading room', '4.2', '0.167', '14', '6', '12'],
  ['FC-1.03', 'Level 1', 'A', '1.05 Map store', '2.9', '', '11.5', '6', '12'],
  ['FC-1.04', 'Level 1', 'A', '1.08 Lobby', '6.3', '0.25', '18', '6', '12'],
  ['FC-2.01', 'Level 2', 'A', '2.01 Office', '3.1', '0.123', '12', '6', '12'],
  ['FC-2.02', 'Level 2', 'A', '2.02 Office', '3.1', '0.123', '12', '6', '12'],
  ['FC-2.03', 'Level 2', 'A', '2.06 Meeting room', '5', '0.198', '16', '6', '12'],
  ['FC-2.04', 'Level 2', 'A', '2.07 Bindery', '7.5', '0.298', '19.5', '6', '12'],
];

export const exampleSchedule = rows.map((row) => row.join(',')).join('\r\n') + '\r\n';
