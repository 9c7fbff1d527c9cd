import { readdirSync } from 'node:fs';

import { describe, expect, test } from 'vitest';

import { readCase } from '../../sim/case/read.ts';
import { curveValue } from '../../sim/case/curve.ts';
import { formatMeasured, inUnit } from '../../sim/case/measured.ts';
import { acetone, caseText, mustRead, put } from './support.ts';

const NAMES = readdirSync(new URL('../../cases', import.meta.url))
  .filter((name) => name.endsWith('.json') && !name.endsWith('.schema.json'))
  .map((name) => name.replace('.json', ''));

describe('shipped cases', () => {
  test.each(NAMES)('%s reads without issue or warning and says what it shows first', (name) => {
    const text = caseText(name);
    expect(readCase(text)).toMatchObject({ ok: true, warnings: [] });
    const keys = Object.keys(JSON.parse(text) as object);
    expect(keys.slice(0, 4)).toEqual(['$schema', 'shows', 'formatVersion', 'invented']);
  });

  test.each(NAMES)('%s gives an origin for each default, and no number without one', (name) => {
    const { provenance } = mustRead(caseText(name));
    expect(provenance.filter(({ isDefault }) => isDefault).length).toBeGreaterThan(20);
    for (const { path, source } of provenance) expect(`${path} ${source}`).not.toMatch(/undefined|NaN| $/);
  });

  test.each(NAMES)('%s holds no number that is not finite', (name) => {
    const broken: string[] = [];
    const walk = (value: unknown, path: string): void => {
      if (typeof value === 'number' && !Number.isFinite(value)) broken.push(path);
      if (typeof value === 'object' && value !== null) {
        for (const [key, item] of Object.entries(value)) walk(item, `${path}.${key}`);
      }
    };
    walk(mustRead(caseText(name)), name);
    expect(broken).toEqual([]);
  });

  test('the same text gives the same case', () => {
    const text = caseText('acetone-absorber');
    expect(JSON.stringify(mustRead(text))).toBe(JSON.stringify(mustRead(text)));
  });
});

describe('the acetone case in SI', () => {
  const value = mustRead(caseText('acetone-absorber'));

  test('plant', () => {
    expect(value.column).toMatchObject({ diameter: 0.82, topPressure: 101_325 });
    expect(value.gas.feed).toMatchObject({ rate: 48, temperature: 303, humidity: 0.5 });
    expect(value.gas.feed.composition[0]).toBeCloseTo(4e-3, 15);
    expect(value.liquid.feed.rate).toBeCloseTo(2.4e-3, 15);
    expect(value.column.transfer).toMatchObject({ model: 'onda', kLFactor: 0.0051, areaFactor: 1.45, scaleArea: 1 });
    expect(value.solutes[0]?.equilibrium).toEqual({ model: 'henry', solubility: 0.27, temperatureFactor: 5500 });
  });

  test('a mass per normal volume becomes a mole fraction of the stated gas', () => {
    const limit = value.limits.find(({ id }) => id === 'outlet-half-hour');
    // 350e-6 kg/Nm3 / 0.05808 kg/mol x 0.022414 m3/mol.
    expect(limit?.value).toBeCloseTo(135.07e-6, 8);
    expect(limit).toMatchObject({ basis: 'dry', unit: 'mg/Nm3', averaging: { kind: 'rolling', window: 1800 } });
  });

  test('instruments, alarms and controller in the kinds of what they measure', () => {
    const alarm = value.alarms.find(({ tag }) => tag === 'AAH-310');
    expect(alarm).toMatchObject({ instrument: 'AT-310', kind: 'high', onDelay: 5, offDelay: 0, priority: 'high' });
    expect(alarm?.setpoint).toBeCloseTo(180e-6, 15);
    expect(value.controllers[0]).toMatchObject({ gain: 2, integralTime: 120, action: 'direct', outputRange: [0, 1] });
    expect(value.instruments.find(({ tag }) => tag === 'FT-311')?.range).toEqual([0, 0.005]);
  });

  test('actions by tag become actions on the plant', () => {
    const trip = value.interlocks.find(({ tag }) => tag === 'IS-301');
    expect(trip?.actions).toEqual([
      { kind: 'valve', valve: 'diversion', command: 1 },
      { kind: 'valve', valve: 'gas-inlet', command: 0 },
    ]);
    const spike = value.scenarios.find(({ id }) => id === 'feed-spike')?.steps[0];
    expect(spike).toMatchObject({ role: 'upset', trigger: { kind: 'time', at: 60 } });
    expect(spike?.actions).toEqual([
      {
        kind: 'change',
        channel: { name: 'gas.composition', solute: 0 },
        how: { kind: 'times', value: 2, over: 0, duration: 300 },
      },
    ]);
  });

  test('measured values are shown in the unit that the instrument states', () => {
    const basis = { solute: 0.05808, solvent: 0.018015268, density: 999 };
    expect(formatMeasured(135.07e-6, 'mg/Nm3', { quantity: 'gas-outlet', basis, range: undefined }, 3)).toBe(
      '350 mg/Nm3',
    );
    expect(formatMeasured(288.15, 'degC', { quantity: 'sump-temperature', basis: undefined, range: undefined })).toBe(
      '15 degC',
    );
    expect(inUnit(2.6e3, 'kPa', { quantity: 'bed-dp', basis: undefined, range: undefined })).toBeCloseTo(2.6, 12);
  });
});

describe('other cases', () => {
  test('ug/L of chloroform in water at 288 K is about 1.2e-7 mol/mol', () => {
    const { liquid, limits } = mustRead(caseText('chloroform-stripper'));
    // 800e-6 kg/m3 / 0.11938 kg/mol / (999.1/0.0180153 mol/m3) = 1.208e-7.
    expect(liquid.feed.composition[0]).toBeCloseTo(1.208e-7, 10);
    expect((limits[0]?.value ?? 0) / (liquid.feed.composition[0] ?? 1)).toBeCloseTo(10 / 800, 6);
  });

  test('the constant-coefficient case has an absorption factor of 1.3', () => {
    const { gas, liquid, solvent, solutes, column } = mustRead(caseText('constant-coefficients'));
    const L = (liquid.feed.rate * curveValue(solvent.density, liquid.feed.temperature)) / solvent.molarMass;
    const equilibrium = solutes[0]?.equilibrium;
    const m = equilibrium?.model === 'constant-ratio' ? equilibrium.m : Number.NaN;
    // The file states the rate with six figures.
    expect(L / (m * gas.feed.rate)).toBeCloseTo(1.3, 4);
    expect(column.transfer).toMatchObject({ model: 'measured', statedAs: { kind: 'NOG', value: 5 } });
    expect(solvent.vapourPressure).toBeUndefined();
  });

  test('in oil benzene and toluene follow Raoult, with the library vapour pressures', () => {
    const { solutes } = mustRead(caseText('benzene-wash-oil'));
    const equilibrium = solutes[0]?.equilibrium;
    expect(equilibrium?.model).toBe('raoult');
    if (equilibrium?.model !== 'raoult') return;
    const { A, B, C } = equilibrium.vapourPressure;
    // Benzene boils at 353.24 K under 101.325 kPa [CRC2004]; the fit is good to about 1 %.
    expect(Math.abs(Math.exp(A - B / (353.24 + C)) / 101_325 - 1)).toBeLessThan(0.01);
  });
});

describe('the case over the library', () => {
  test('some numbers of a packing, the rest from its library entry', () => {
    const tree = put(acetone(), 'column/beds/0/packing', {
      base: 'PR-MET-35',
      friction: { C3: 1.8 },
      voidFraction: '95 %',
    });
    const { packing } = mustRead(JSON.stringify(tree)).column.beds[0] ?? {};
    expect(packing).toMatchObject({ id: 'PR-MET-35', area: 139.4, friction: { C3: 1.8 } });
    expect(packing?.voidFraction).toBeCloseTo(0.95, 14);
    expect(packing?.friction?.C1).toBeGreaterThan(0);
  });

  test('a whole packing, solvent, carrier and solute of the user', () => {
    const tree = acetone();
    put(tree, 'column/beds/0/packing', {
      id: 'own-ring',
      nominalSize: '1 in',
      area: '60 ft2/ft3',
      voidFraction: 0.9,
      criticalSurfaceTension: '60 dyn/cm',
      solidHeatCapacity: '2 MJ/(m3 K)',
      friction: { C1: 1, C2: 1, C3: 1 },
    });
    put(tree, 'solvent', {
      id: 'glycol',
      molarMass: '62.07 g/mol',
      density: { temperature: ['280 K', '320 K'], value: ['1120 kg/m3', '1095 kg/m3'] },
      viscosity: { temperature: ['280 K', '320 K'], value: ['35 cP', '9 cP'], interpolation: 'log' },
      surfaceTension: '48 mN/m',
      heatCapacity: '150 J/(mol K)',
      vapourHeatCapacity: '100 J/(mol K)',
      diffusionVolume: 60,
    });
    put(tree, 'carrier', { base: 'nitrogen', molarMass: '28.5 g/mol' });
    put(tree, 'gas/feed/humidity', undefined);
    put(tree, 'solutes', [
      {
        id: 'acetone',
        molarMass: '58.08 g/mol',
        vapourHeatCapacity: '75 J/(mol K)',
        heatCapacity: '126 J/(mol K)',
        molarVolume: '74 cm3/mol',
        boilingVolume: 74,
        diffusionVolume: 67,
        equilibrium: {
          model: 'table',
          temperature: ['288 K', '308 K'],
          moleFraction: ['0 mol%', '1 mol%', '2 mol%'],
          pressure: [
            ['0 Pa', '200 Pa', '390 Pa'],
            ['0 Pa', '500 Pa', '970 Pa'],
          ],
        },
      },
    ]);
    put(tree, 'uncertainty', undefined);
    const value = mustRead(JSON.stringify(tree));
    expect(value.column.beds[0]?.packing.area).toBeCloseTo(60 / 0.3048, 9);
    expect(value.carrier).toMatchObject({ id: 'nitrogen', molarMass: 0.0285 });
    expect(curveValue(value.solvent.density, 300)).toBeCloseTo(1107.5, 9); // midway between the points
    expect(curveValue(value.solvent.viscosity, 280)).toBeCloseTo(0.035, 12);
    expect(value.solutes[0]?.equilibrium.model).toBe('table');
  });

  test('an equilibrium table from CSV, rows in any order, decimal commas', () => {
    const tree = put(acetone(), 'solutes/0', { base: 'acetone', equilibrium: { model: 'table', file: 'eq.csv' } });
    put(tree, 'uncertainty', undefined);
    const csv = 'T [degC];x [mol%];p [kPa]\n25;0;0\n25;1,0;0,2\n15;1,0;0,12\n15;0;0\n';
    const { solutes } = mustRead(JSON.stringify(tree), {
      resolveFile: (name) => (name === 'eq.csv' ? csv : undefined),
    });
    expect(solutes[0]?.equilibrium).toEqual({
      model: 'table',
      temperature: [288.15, 298.15],
      moleFraction: [0, 0.01],
      pressure: [
        [0, 120],
        [0, 200],
      ],
    });
  });
});

describe('values with their own scale', () => {
  test('humidity as share, dew point and mole fraction is the same air', () => {
    const humidity = (text: string): number =>
      mustRead(JSON.stringify(put(acetone(), 'gas/feed/humidity', text))).gas.feed.humidity;
    // Water's vapour pressure is 3169.75 Pa at 25 degC and 1228.18 Pa at 10 degC [IF97].
    const tree = (text: string): number =>
      mustRead(JSON.stringify(put(put(acetone(), 'gas/feed/temperature', '25 degC'), 'gas/feed/humidity', text))).gas
        .feed.humidity;
    expect(humidity('40 %')).toBeCloseTo(0.4, 12);
    expect(tree('10 degC')).toBeCloseTo(1228.18 / 3169.75, 5);
    expect(tree('1 mol%')).toBeCloseTo(1013.25 / 3169.75, 5);
  });

  test('a share of the range stands for a value of the instrument', () => {
    const tree = put(acetone(), 'alarms/LAH-312/high', '75 % of range');
    put(tree, 'alarms/LAH-312/deadband', '5 % of range');
    const alarm = mustRead(JSON.stringify(tree)).alarms.find(({ tag }) => tag === 'LAH-312');
    expect(alarm?.setpoint).toBeCloseTo(0.9, 12);
    expect(alarm?.deadband).toBeCloseTo(0.06, 12);
  });

  test('a deadband left out comes from the starting table, as a share of the range', () => {
    const tree = put(acetone(), 'alarms/LAH-312/deadband', undefined);
    const value = mustRead(JSON.stringify(tree));
    expect(value.alarms.find(({ tag }) => tag === 'LAH-312')?.deadband).toBeCloseTo(0.05 * 1.2, 12);
    expect(value.provenance.find(({ path }) => path === 'alarms.LAH-312.deadband')).toMatchObject({
      isDefault: true,
      verified: 'from memory',
    });
  });

  test('a liquid strength by mass and by volume', () => {
    const x = (text: string): number =>
      mustRead(JSON.stringify(put(acetone(), 'liquid/feed/composition', { acetone: text }))).liquid.feed
        .composition[0] ?? 0;
    // 10 wt% acetone: (10/58.08)/(10/58.08 + 90/18.0153) = 0.03332.
    expect(x('10 wt%')).toBeCloseTo(0.03332, 5);
    // 1 g/L in water of 999.1 kg/m3 is 1001 ppmw.
    expect(x('1 g/L') / x('1000.9 ppmw')).toBeCloseTo(1, 4);
  });

  test('gain in per cent over per cent of range, drift per hour', () => {
    const tree = put(acetone(), 'controllers/LIC-312/gain', '2.4 %/% of range');
    put(tree, 'instruments/AT-310/drift', '36 ppmv/h');
    const value = mustRead(JSON.stringify(tree));
    expect(value.controllers[0]?.gain).toBeCloseTo(2, 12); // range 1.2 m
    expect(value.instruments.find(({ tag }) => tag === 'AT-310')?.drift).toBeCloseTo(1e-8, 20);
  });

  test('a difference on a channel counts from the value of the case', () => {
    const steps = [{ at: '0 s', change: 'liquid.temperature', by: '9 delta degF' }];
    const action = mustRead(JSON.stringify(put(acetone(), 'scenarios/feed-spike/steps', steps))).scenarios.find(
      ({ id }) => id === 'feed-spike',
    )?.steps[0]?.actions[0];
    const value = action?.kind === 'change' && action.how.kind === 'to' ? action.how.value : undefined;
    expect(value).toBeCloseTo(293, 9); // 288 K and 9 degF, which are 5 K
  });

  test('"set" changes several quantities at once', () => {
    const steps = [{ at: '0 s', set: { 'gas.rate': '30 mol/s', 'gas.temperature': '20 degC' }, over: '10 s' }];
    const found = mustRead(JSON.stringify(put(acetone(), 'scenarios/feed-spike/steps', steps))).scenarios.find(
      ({ id }) => id === 'feed-spike',
    );
    expect(found?.steps[0]?.actions).toHaveLength(2);
  });
});
