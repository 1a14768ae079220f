import type { RunPart } from '@/converters/spread'
import type { SpreadRunRequest } from '@/server/contract/spreadRuns'

/**
 * Evaluations of one block at least, and blocks of one run at most. A block begins by drawing the whole hypercube, so it
 * must not be too small; while it runs it holds its thread, so it must not take longer than a visitor cares to wait: each
 * comes to a few tenths of a second.
 */
const BLOCK_SIZES = {
  averaged: { least: 1_000, most: 50 },
  switched: { least: 250, most: 400 },
} as const

/** Cuts a run into parts that depend on the request alone, so that the same request has the same answer on any machine. */
export function blocksOf({ options }: SpreadRunRequest, evaluations: number): RunPart[] {
  const { least, most } = BLOCK_SIZES[options.model]
  const of = Math.min(most, Math.ceil(evaluations / least))
  return Array.from({ length: of }, (_, index) => ({ index, of }))
}
