import { readFileSync } from 'node:fs';

import { describe, expect, test } from 'vitest';

import { isShared, LONGEST_LINK, packWork, unpackWork } from '../../../ui/store/share.ts';
import { workOn } from '../../../ui/store/work.ts';

const demo = workOn('acetone-absorber.json', readFileSync('cases/acetone-absorber.json', 'utf8'));

describe('a link with a case in it', () => {
  test('comes back as it went', async () => {
    const work = { ...demo, scenario: 'feed-spike', units: { system: 'us' as const, own: { length: 'm' } } };
    const packed = await packWork(work);
    if (!packed.ok) throw new Error('refused');
    expect(isShared(packed.fragment)).toBe(true);
    expect(packed.fragment).toMatch(/^#case=[\w-]+$/);
    expect(await unpackWork(packed.fragment)).toEqual(work);
  });

  test('the demo fits into a tenth of the longest', async () => {
    const packed = await packWork(demo);
    expect(packed.ok && packed.fragment.length).toBeLessThan(LONGEST_LINK / 5);
  });

  test('a case that is too large is refused with its length', async () => {
    let noise = '';
    for (let i = 0; noise.length < 80_000; i++) noise += Math.sin(i).toString(36).slice(2);
    const packed = await packWork({ ...demo, text: JSON.stringify({ noise }) });
    expect(packed).toMatchObject({ ok: false });
  });

  test('a damaged link is none', async () => {
    const packed = await packWork(demo);
    if (!packed.ok) throw new Error('refused');
    expect(await unpackWork(packed.fragment.slice(0, -40))).toBeUndefined();
    expect(await unpackWork('#case=%%%')).toBeUndefined();
    expect(await unpackWork('#case=')).toBeUndefined();
    expect(await unpackWork('#elsewhere')).toBeUndefined();
  });
});
