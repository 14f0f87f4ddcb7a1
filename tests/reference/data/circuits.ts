import type { Circuit } from '../support/records';
import { BIRD_EXAMPLES } from './bird';
import { POWER_TRANSFER, THREE_PHASES } from './bird-power';
import { BIRD_RESONANCE } from './bird-resonance';
import { DISCHARGES } from './discharge';
import { DISC_REPLAY } from './disc-replay';
import { KUPHALDT_EXAMPLES } from './kuphaldt';
import { OTHER_EXAMPLES } from './other-textbooks';
import { RC_NETWORKS } from './rc-networks';
import { WEIGHTING_CIRCUITS } from './sound-weighting';
import { ACTIVE_STARTERS } from './starters-active';
import { INTERFERENCE_STARTERS } from './starters-interference';
import { LOUDSPEAKER_STARTERS } from './starters-loudspeaker';
import { PAD_STARTERS } from './starters-pads';
import { POWER_STARTERS } from './starters-power';
import { RADIO_STARTERS, RESONANT_RADIO_STARTERS, SERIES_ARM } from './starters-radio';
import { SENSOR_AUDIO_STARTERS } from './starters-sensor-audio';
import { TABULATED } from './tabulated-impedance';

/** Every network with its figures. */
export const CIRCUITS: readonly Circuit[] = [
  ...KUPHALDT_EXAMPLES,
  ...BIRD_EXAMPLES,
  ...OTHER_EXAMPLES,
  ...POWER_TRANSFER,
  ...THREE_PHASES,
  ...BIRD_RESONANCE,
  ...WEIGHTING_CIRCUITS,
  ...DISC_REPLAY,
  ...RC_NETWORKS,
  ...DISCHARGES,
  ...TABULATED,
  ...SENSOR_AUDIO_STARTERS,
  ...ACTIVE_STARTERS,
  ...LOUDSPEAKER_STARTERS,
  ...INTERFERENCE_STARTERS,
  ...RADIO_STARTERS,
  ...RESONANT_RADIO_STARTERS,
  SERIES_ARM,
  ...PAD_STARTERS,
  ...POWER_STARTERS,
];
