import { describe, expect, it } from 'vitest';
import { assetPathsIn, pathsInStyle } from '@/lib/client/shell-cache';

describe('what a page is made of', () => {
  it('is found in its tags and in the data that it carries, each once', () => {
    const html = String.raw`<link rel="stylesheet" href="/_next/static/chunks/a1.css"/><script src="/_next/static/chunks/main.js" async></script>
      <script>self.__next_f.push([1,"2:I[12,[\"/_next/static/chunks/page-9f.js\",\"/_next/static/chunks/main.js\"],\"Page\"]"])</script>`;
    expect(assetPathsIn(html)).toEqual(['/_next/static/chunks/a1.css', '/_next/static/chunks/main.js', '/_next/static/chunks/page-9f.js']);
  });

  it('is found in its style sheets, by their own place', () => {
    const style = `@font-face{src:url(../media/words.woff2) format("woff2")}a{background:url("data:image/svg+xml,x")}b{background:url('/_next/static/media/b.svg')}`;
    expect(pathsInStyle(style, '/_next/static/chunks/a1.css')).toEqual(['/_next/static/media/words.woff2', '/_next/static/media/b.svg']);
  });
});
