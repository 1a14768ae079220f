/**
 * Power rails of Tidegauge Works, makers of harbour water-level loggers. Company, products and values are invented;
 * no real board is described.
 */
import { beaconFlyback } from '@/db/seed/samples/beaconFlyback'
import { echoBias } from '@/db/seed/samples/echoBias'
import { logicRail } from '@/db/seed/samples/logicRail'
import { radioRail } from '@/db/seed/samples/radioRail'
import { sensorBoost } from '@/db/seed/samples/sensorBoost'
import type { SampleSource } from '@/db/seed/samples/source'
import { vehicleSepic } from '@/db/seed/samples/vehicleSepic'

export const SAMPLES: readonly SampleSource[] = [
  logicRail,
  sensorBoost,
  radioRail,
  echoBias,
  beaconFlyback,
  vehicleSepic,
]
