/** Upsets and actions that a case offers, as steps to begin with. Sizes are round starting points, to be changed. */
import type { Case } from '../../sim/index.ts';

/** One thing that can happen or be done. */
export interface StepChoice {
  readonly role: 'upset' | 'action';
  readonly label: string;
  /** As a case file writes it, without a time. */ readonly step: Readonly<Record<string, unknown>>;
}

/** All that a case offers. */
export function stepChoices(plant: Case): StepChoice[] {
  return [...upsets(plant), ...actions(plant)];
}

function upsets(plant: Case): StepChoice[] {
  const { liquid, gas, solutes, instruments } = plant;
  const { duty, standby } = liquid.pumps;
  const fan = gas.source.kind === 'fan' ? gas.source.tag : undefined;
  const machines = [duty, ...(fan === undefined ? [] : [fan])];
  const upset = (label: string, step: StepChoice['step']): StepChoice => ({ role: 'upset', label, step });
  return [
    upset(`${duty} trips`, { stop: duty, label: `${duty} trips` }),
    ...(fan === undefined ? [] : [upset(`${fan} trips`, { stop: fan, label: `${fan} trips` })]),
    ...solutes.map(({ id, name }) =>
      upset(`${name} in the feed doubles for 5 min`, { change: `gas.composition.${id}`, times: 2, for: '5 min' }),
    ),
    upset('gas 30 % up for 10 min', { change: 'gas.rate', times: 1.3, over: '10 s', for: '10 min' }),
    upset('gas 20 K warmer for 10 min', { change: 'gas.temperature', by: '20 K', over: '60 s', for: '10 min' }),
    upset('liquid 10 K warmer for 10 min', { change: 'liquid.temperature', by: '10 K', over: '60 s', for: '10 min' }),
    ...(liquid.cooler === undefined
      ? []
      : [upset('cooling is lost for 10 min', { change: 'cooling', to: '0 %', for: '10 min' })]),
    upset('a tenth of the voids fouls within 30 min', { change: 'packing.fouling', to: '10 %', over: '30 min' }),
    upset('foam: capacity down to 70 % for 10 min', { change: 'packing.foaming', to: '70 %', for: '10 min' }),
    upset(`power dip of ${machines.join(' and ')} for 5 s`, {
      powerDip: machines,
      for: '5 s',
      label: `power dip of ${machines.join(' and ')}`,
    }),
    ...(standby === undefined
      ? []
      : [upset(`${standby} cannot be started`, { lockOut: standby, label: `${standby} cannot be started` })]),
    ...instruments.flatMap(({ tag }) => [
      upset(`${tag} freezes`, { fault: 'freeze', instrument: tag }),
      upset(`${tag} fails high`, { fault: 'fail-high', instrument: tag }),
      upset(`${tag} fails low`, { fault: 'fail-low', instrument: tag }),
    ]),
    upset(`${liquid.valve.tag} sticks`, { stick: 'solvent', label: `${liquid.valve.tag} sticks` }),
  ];
}

function actions(plant: Case): StepChoice[] {
  const { liquid, gas, controllers, interlocks } = plant;
  const { duty, standby } = liquid.pumps;
  const fan = gas.source.kind === 'fan' ? gas.source.tag : undefined;
  const action = (label: string, step: StepChoice['step']): StepChoice => ({
    role: 'action',
    label,
    step: { ...step, role: 'action', label },
  });
  return [
    ...(standby === undefined ? [] : [action(`start ${standby}`, { start: standby })]),
    action(`start ${duty}`, { start: duty }),
    ...(fan === undefined ? [] : [action(`start ${fan}`, { start: fan }), action(`stop ${fan}`, { stop: fan })]),
    action('gas cut to 70 % within 1 min', { change: 'gas.rate', times: 0.7, over: '60 s' }),
    action('gas cut to 40 % within 1 min', { change: 'gas.rate', times: 0.4, over: '60 s' }),
    action('pump speed to 110 %', { change: 'pump.speed', to: '110 %', over: '5 s' }),
    ...(gas.diversion === undefined
      ? []
      : [
          action(`open the diversion ${gas.diversion.tag} and close ${gas.inletValve.tag}`, {
            do: [{ open: 'diversion' }, { close: 'gas-inlet' }],
          }),
        ]),
    action(`close the gas inlet ${gas.inletValve.tag}`, { close: 'gas-inlet' }),
    action(`open the gas inlet ${gas.inletValve.tag}`, { open: 'gas-inlet' }),
    ...(liquid.emergencyWater === undefined
      ? []
      : [action(`open the emergency water ${liquid.emergencyWater.tag}`, { open: 'emergency-water' })]),
    ...(liquid.makeUp === undefined
      ? []
      : [action(`open the make-up ${liquid.makeUp.tag} fully`, { open: 'make-up' })]),
    ...(liquid.bleed === undefined ? [] : [action(`open the bleed ${liquid.bleed.tag} fully`, { open: 'bleed' })]),
    ...controllers.map(({ tag }) =>
      action(`${tag} to manual, output 50 %`, { controller: tag, mode: 'manual', output: '50 %' }),
    ),
    ...interlocks.map(({ tag }) => action(`reset ${tag}`, { interlock: tag, command: 'reset' })),
  ];
}
