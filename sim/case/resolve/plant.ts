// The plant around the bed: gas supply and liquid supply, with every default filled in.

import type { ColumnSpec, GasSupply, LiquidSupply, Stream } from '../case.ts';
import { GAS, LIQUID } from '../defaults.ts';
import { join } from '../issues.ts';
import type { Default, Reading } from '../reading.ts';
import type { GasText, LiquidText } from '../schema/plant.ts';
import type { Substances } from './strengths.ts';
import { readComposition, readHumidity } from './strengths.ts';

/** The gas supply, or undefined after noting why not. `pressure`: at the top, Pa. */
export function readGas(
  reading: Reading,
  given: GasText,
  substances: Substances,
  pressure: number,
): GasSupply | undefined {
  const path = 'gas';
  const { feed } = given;
  const composition = readComposition(
    reading,
    'gas.feed.composition',
    feed.composition,
    true,
    substances,
    feed.temperature,
    GAS.composition,
  );
  const humidity = readHumidity(
    reading,
    'gas.feed.humidity',
    feed.humidity,
    substances.solvent,
    feed.temperature,
    pressure,
    GAS.humidity,
  );
  if (given.range !== undefined && given.range[0] >= given.range[1]) {
    reading.object('contradiction', 'gas.range', 'a lower and a higher rate', 'no range between them');
  }
  if (given.range !== undefined && (feed.rate < given.range[0] || feed.rate > given.range[1])) {
    reading.warn('range', 'gas.feed.rate', 'a rate within gas.range', `${feed.rate} mol/s`);
  }
  const source = readSource(reading, given.source);
  if (composition === undefined || humidity === undefined || source === undefined) return undefined;
  const valve = given.inletValve;
  return {
    feed: { rate: feed.rate, temperature: feed.temperature, humidity, composition },
    range: given.range,
    source,
    inletValve: {
      tag: reading.fill(join(path, 'inletValve.tag'), valve?.tag, GAS.inletValveTag),
      stroke: reading.fill(join(path, 'inletValve.stroke'), valve?.stroke, GAS.stroke),
    },
    diversion:
      given.diversion === undefined
        ? undefined
        : {
            tag: given.diversion.tag,
            stroke: reading.fill('gas.diversion.stroke', given.diversion.stroke, GAS.stroke),
          },
  };
}

function readSource(reading: Reading, given: GasText['source']): GasSupply['source'] | undefined {
  const lag = reading.fill('gas.source.lag', given?.lag, GAS.lag);
  if (given === undefined || given.kind === 'forced') return { kind: 'forced', lag };
  if (given.ratedPressure >= given.shutOffPressure) {
    reading.object(
      'contradiction',
      'gas.source.ratedPressure',
      'a rise at the rated flow below that at shut-off',
      `${given.ratedPressure} Pa against ${given.shutOffPressure} Pa`,
    );
    return undefined;
  }
  return {
    kind: 'fan',
    tag: given.tag,
    shutOffPressure: given.shutOffPressure,
    ratedFlow: given.ratedFlow,
    ratedPressure: given.ratedPressure,
    lag,
    coastDown: reading.fill('gas.source.coastDown', given.coastDown, GAS.coastDown),
    runUp: reading.fill('gas.source.runUp', given.runUp, GAS.runUp),
  };
}

/** The liquid supply, or undefined after noting why not. */
export function readLiquid(
  reading: Reading,
  given: LiquidText,
  substances: Substances,
  column: Pick<ColumnSpec, 'diameter'>,
): LiquidSupply | undefined {
  const design = given.feed.rate;
  const perRate = (share: Default<number>): Default<number> => ({ ...share, value: share.value * design });
  const stream = (path: string, text: LiquidText['feed']): Stream | undefined => {
    const composition = readComposition(
      reading,
      join(path, 'composition'),
      text.composition,
      false,
      substances,
      text.temperature,
      LIQUID.composition,
    );
    return composition === undefined ? undefined : { rate: text.rate, temperature: text.temperature, composition };
  };
  const before = reading.issues.length;
  const feed = stream('liquid.feed', given.feed);
  const { pumps } = given;
  const recirculated = given.mode === 'recirculated';
  const makeUpText = given.makeUp === 'none' ? undefined : given.makeUp;
  if (recirculated && given.makeUp === undefined) {
    reading.object(
      'missing',
      'liquid.makeUp',
      'a make-up, or "none"',
      'nothing',
      'a recirculated solvent that evaporates or is bled needs one',
    );
  }
  if (!recirculated && makeUpText !== undefined) {
    reading.object('contradiction', 'liquid.makeUp', 'no make-up for a once-through solvent', 'a make-up');
  }
  if (!recirculated && given.bleed !== undefined) {
    reading.object(
      'contradiction',
      'liquid.bleed',
      'no bleed for a once-through solvent',
      'a bleed',
      'the drain takes it all',
    );
  }
  const makeUpStream = makeUpText === undefined ? undefined : stream('liquid.makeUp', makeUpText);
  const waterText = given.emergencyWater;
  const waterStream = waterText === undefined ? undefined : stream('liquid.emergencyWater', waterText);
  const sump = readSump(reading, given, column, perRate(LIQUID.capacityShare));
  const minimumLevel = reading.fill('liquid.pumps.minimumLevel', pumps.minimumLevel, LIQUID.minimumLevel);
  if (recirculated && sump !== undefined && minimumLevel >= sump.normalLevel) {
    reading.object(
      'contradiction',
      'liquid.pumps.minimumLevel',
      'a level below the normal one',
      `${minimumLevel} m against ${sump.normalLevel} m`,
    );
  }
  const stroke = (path: string, value: number | undefined): number =>
    reading.fill(join(path, 'stroke'), value, LIQUID.stroke);
  const supply = {
    mode: given.mode,
    pumps: {
      duty: pumps.duty,
      standby: pumps.standby,
      staticHeadShare: reading.fill('liquid.pumps.staticHeadShare', pumps.staticHeadShare, LIQUID.staticHeadShare),
      coastDown: reading.fill('liquid.pumps.coastDown', pumps.coastDown, LIQUID.coastDown),
      runUp: reading.fill('liquid.pumps.runUp', pumps.runUp, LIQUID.runUp),
      minimumLevel,
    },
    valve: {
      tag: reading.fill('liquid.valve.tag', given.valve?.tag, LIQUID.valveTag),
      stroke: stroke('liquid.valve', given.valve?.stroke),
    },
    distributorVolume: reading.fill(
      'liquid.distributorVolume',
      given.distributorVolume,
      perRate(LIQUID.distributorSeconds),
    ),
    cooler: given.cooler,
    makeUp:
      makeUpText === undefined || makeUpStream === undefined
        ? undefined
        : {
            ...makeUpStream,
            tag: makeUpText.tag,
            capacity: capacity(reading, 'liquid.makeUp', makeUpText.capacity, makeUpText.rate),
            stroke: stroke('liquid.makeUp', makeUpText.stroke),
          },
    bleed:
      given.bleed === undefined
        ? undefined
        : {
            tag: given.bleed.tag,
            rate: given.bleed.rate,
            capacity: capacity(reading, 'liquid.bleed', given.bleed.capacity, given.bleed.rate),
            stroke: stroke('liquid.bleed', given.bleed.stroke),
          },
    emergencyWater:
      waterText === undefined || waterStream === undefined
        ? undefined
        : { ...waterStream, tag: waterText.tag, stroke: stroke('liquid.emergencyWater', waterText.stroke) },
  };
  if (feed === undefined || sump === undefined || reading.issues.length > before) return undefined;
  return { ...supply, feed, sump };
}

function capacity(reading: Reading, path: string, given: number | undefined, rate: number): number {
  const value = reading.fill(join(path, 'capacity'), given, {
    ...LIQUID.capacityShare,
    value: LIQUID.capacityShare.value * rate,
  });
  if (value < rate)
    reading.object('contradiction', join(path, 'capacity'), `at least the design rate, ${rate} m3/s`, `${value} m3/s`);
  return value;
}

function readSump(
  reading: Reading,
  given: LiquidText,
  column: Pick<ColumnSpec, 'diameter'>,
  drainCapacity: Default<number>,
): LiquidSupply['sump'] | undefined {
  const path = 'liquid.sump';
  const sump = given.sump ?? {};
  const section = (Math.PI / 4) * column.diameter ** 2;
  const area = reading.fill(join(path, 'area'), sump.area, {
    ...LIQUID.sumpAreaShare,
    value: LIQUID.sumpAreaShare.value * section,
  });
  const normalLevel = reading.fill(join(path, 'normalLevel'), sump.normalLevel, LIQUID.normalLevel);
  const overflowLevel = reading.fill(join(path, 'overflowLevel'), sump.overflowLevel, {
    ...LIQUID.overflowShare,
    value: LIQUID.overflowShare.value * normalLevel,
  });
  const drain = {
    tag: reading.fill(join(path, 'drain.tag'), sump.drain?.tag, LIQUID.drainTag),
    capacity: reading.fill(join(path, 'drain.capacity'), sump.drain?.capacity, drainCapacity),
    stroke: reading.fill(join(path, 'drain.stroke'), sump.drain?.stroke, LIQUID.drainStroke),
  };
  if (overflowLevel <= normalLevel) {
    reading.object(
      'contradiction',
      join(path, 'overflowLevel'),
      `a level above the normal one, ${normalLevel} m`,
      `${overflowLevel} m`,
    );
    return undefined;
  }
  if (given.mode === 'once-through' && drain.capacity < given.feed.rate) {
    reading.object(
      'contradiction',
      join(path, 'drain.capacity'),
      `at least the design rate, ${given.feed.rate} m3/s`,
      `${drain.capacity} m3/s`,
    );
    return undefined;
  }
  return { area, normalLevel, overflowLevel, drain };
}
