import { expect, it } from 'vitest';
import { inDrawingWords, pieceNames } from '@/lib/network/piece-names';
import { ladder } from '../../make/drawing';

const drawn = ladder([0.2, 0.3]);
const names = pieceNames({ ...drawn, equipment: drawn.equipment.map((piece) => (piece.id === 'S-1' ? { ...piece, tag: '' } : piece)) });

it('a piece is called by its tag, a pipe by what it joins', () => {
  expect(names.get('FC-1')).toBe('FC-1');
  expect(names.get('S-1')).toBe('Tee');
  expect(names.get('s-2')).toBe('Pipe tee to S-2');
});

it('a message of the engine says names where it said ids, and nothing else is changed', () => {
  expect(inDrawingWords('FC-1:coil is left out: its circuit is not open all round.', names)).toBe(
    'FC-1 (coil) is left out: its circuit is not open all round.',
  );
  expect(inDrawingWords('Flow is between laminar and turbulent in s-2, b-1: uncertain, 0.3 L/s.', names)).toBe(
    'Flow is between laminar and turbulent in Pipe tee to S-2, Pipe FC-1 to R-1: uncertain, 0.3 L/s.',
  );
  expect(inDrawingWords('Nothing joins P-1.in to the reference.', names)).toBe('Nothing joins P-1 to the reference.');
});
