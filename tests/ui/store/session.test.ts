// Costs some 2 s: a dozen short runs.
import { describe, expect, test } from 'vitest';

import { createRun, readCase, resultOf, writeCsv } from '../../../sim/index.ts';
import { Autosave } from '../../../ui/store/autosave.ts';
import { createRig, isWhole, quickCase, until } from '../support/session.ts';

describe('a session', () => {
  test('reads its case and runs the first scenario', async () => {
    const { session } = createRig();
    session.start(undefined);
    const { main, read } = await until(session, isWhole);
    expect(read.issues).toEqual([]);
    expect(main.packet?.document.closure.ok).toBe(true);
    expect(main.packet?.sentence.case).toMatch(/^Acetone at the outlet peaks at/);
  });

  test('an edit runs again, undo brings back the first curve without a run, redo the second', async () => {
    const { session, line } = createRig();
    session.start(undefined);
    const first = (await until(session, isWhole)).main.packet!;
    session.setField(['column', 'beds', 0, 'height'], '6 m');
    const second = (await until(session, (s) => isWhole(s) && s.main.packet !== first)).main.packet!;
    const peak = (p: typeof first): number => p.document.answers.limits[0]!.peak.value;
    expect(peak(second)).toBeLessThan(peak(first));
    const runs = line.sent.filter((r) => r.kind === 'run').length;
    session.undo();
    expect(session.work.text).toBe(quickCase());
    expect((await until(session, (s) => isWhole(s) && s.main.packet === first)).canRedo).toBe(true);
    session.redo();
    await until(session, (s) => isWhole(s) && s.main.packet === second);
    expect(line.sent.filter((r) => r.kind === 'run')).toHaveLength(runs);
  });

  test('of two edits in a row only the last is shown', async () => {
    const { session } = createRig();
    session.start(undefined);
    await until(session, isWhole);
    session.setField(['column', 'beds', 0, 'height'], '2 m');
    session.setField(['column', 'beds', 0, 'height'], '7 m');
    const seen: number[] = [];
    session.subscribe(() => {
      const { packet, isStale } = session.state.main;
      if (!isStale && packet !== undefined) seen.push(packet.plant.column.beds[0]!.height);
    });
    const { main } = await until(session, (s) => isWhole(s) && s.main.packet?.plant.column.beds[0]!.height === 7);
    expect(main.packet?.quality).toBe('full');
    expect(seen).not.toContain(2);
  });

  test('a drag is one step back', async () => {
    const { session } = createRig();
    session.start(undefined);
    await until(session, isWhole);
    for (const at of ['31 s', '32 s', '33 s']) {
      session.setField(['scenarios', 'pump-trip', 'steps', 0, 'at'], at, 'move-0');
    }
    session.settle();
    session.undo();
    expect(session.valueAt(['scenarios', 'pump-trip', 'steps', 0, 'at'])).toBe('30 s');
  });

  test('a wrong value is an issue at its path, and the last good run stays', async () => {
    const { session } = createRig();
    session.start(undefined);
    const { main } = await until(session, isWhole);
    session.setField(['column', 'diameter'], '6 kg');
    const state = await until(session, (s) => s.read.issues.length > 0);
    expect(state.read.issues[0]?.path).toBe('column.diameter');
    expect(state.main.packet).toBe(main.packet);
    expect(state.main.isStale).toBe(true);
    session.setField(['column', 'diameter'], '0.9 m');
    await until(session, (s) => isWhole(s) && s.read.issues.length === 0);
  });

  test('an engine that dies in the middle of a run is started again and the run comes', async () => {
    const { session, line } = createRig();
    session.start(undefined);
    await until(session, (s) => s.main.progress !== undefined);
    line.crash();
    const state = await until(session, isWhole);
    expect(state.notices.map((n) => n.text).join()).toContain('started again');
  });

  test('a branch that starts the pump sooner emits less, and can be kept as a scenario', async () => {
    const { session } = createRig();
    session.start(undefined);
    await until(session, isWhole);
    session.addBranch({ label: 'start P-310B at once', at: 35, action: { start: 'P-310B' }, keepsLater: false });
    const whole = (id: string) => (s: typeof session.state) => s.branches.get(id)?.packet?.quality === 'full';
    const { branches, main } = await until(session, whole('b1'));
    const emitted = (p: NonNullable<typeof main.packet>): number => p.document.answers.emissions[0]!.stack;
    expect(emitted(branches.get('b1')!.packet!)).toBeLessThan(emitted(main.packet!));
    session.keepBranch('b1');
    expect(session.work.branches).toEqual([]);
    const { read } = await until(session, (s) => isWhole(s) && s.read.plant?.scenarios.length === 2);
    expect(read.plant?.scenarios[1]?.steps.map((s) => s.label)).toEqual(['P-310A trips', 'start P-310B at once']);
  });

  test('no more than four branches', async () => {
    const { session } = createRig();
    session.start(undefined);
    await until(session, isWhole);
    const branch = { label: 'x', at: 40, action: { start: 'P-310B' }, keepsLater: true };
    expect([1, 2, 3, 4, 5].map(() => session.addBranch(branch))).toEqual([true, true, true, true, false]);
    expect(session.work.branches.map((b) => b.line)).toEqual([1, 2, 3, 4]);
  });

  test('the CSV of a run is the text that the simulator writes for the same case', async () => {
    const { session } = createRig();
    session.start(undefined);
    await until(session, isWhole);
    const read = readCase(quickCase());
    if (!read.ok) throw new Error('the case does not read');
    const run = createRun(read.value, read.value.scenarios[0]!);
    run.advance(Infinity);
    expect(await session.exportRun('csv')).toBe(writeCsv(resultOf(run, { caseText: quickCase() })));
  });

  test('what is typed is kept at once and comes back', async () => {
    const { session, keeper } = createRig();
    session.start(undefined);
    session.setField(['column', 'diameter'], '0.9 m');
    session.rename('mine.json');
    await new Promise((resolve) => setImmediate(resolve));
    const kept = await new Autosave(keeper).load();
    expect(kept?.work).toEqual(session.work);
  });

  test('a file that is no case is refused and said, the work stays', async () => {
    const { session } = createRig();
    session.start(undefined);
    await until(session, isWhole);
    const before = session.work;
    expect(session.open('broken.json', '{ "title": ')).toBe(false);
    const { notices } = await until(session, (s) => s.notices.length > 0);
    expect(notices[0]?.text).toContain('broken.json is not a case file');
    expect(notices[0]?.details[0]).toMatch(/line 1/);
    expect(session.work).toBe(before);
  });

  test('a run is stopped on request and goes on when asked', async () => {
    const { session } = createRig();
    session.start(undefined);
    await until(session, (s) => s.main.progress !== undefined);
    session.stop();
    const { main } = await until(session, (s) => s.main.trouble === 'stopped');
    expect(main.progress).toBeUndefined();
    session.again();
    await until(session, isWhole);
  });

  test('unknown keys in what was kept do no harm', async () => {
    const { session, keeper } = createRig();
    keeper.kept.set('bedwave-work', { work: { name: 1 }, view: 7 });
    expect(await new Autosave(keeper).load()).toBeUndefined();
    session.start({ room: 'nowhere', map: 3, hiddenLanes: ['AT-310', 5] });
    expect(session.state.view).toMatchObject({ room: 'upset', map: 'gas.0', hiddenLanes: ['AT-310'] });
  });
});
