import { expect, it } from 'vitest';
import { sameSitePath } from '@/lib/client/same-site-path';

it.each(['/projects/1/loops/2/drawing?overlay=flow#FC-1', '/people'])('leads back to %s', (path) => {
  expect(sameSitePath(path)).toBe(path);
});

it.each([
  '//elsewhere.example/x',
  '/\\elsewhere.example',
  '/\t/elsewhere.example',
  '/.//elsewhere.example',
  '/./\\elsewhere.example',
  '/projects/..//elsewhere.example',
  'https://elsewhere.example',
  'javascript:alert(1)',
  'people',
  '',
  null,
  undefined,
])('does not lead to %j', (path) => {
  expect(sameSitePath(path)).toBe('/projects');
});
