/** The running product under 50 clients, beside a route that does nothing. */
import { once } from 'node:events'
import { readFile } from 'node:fs/promises'
import { createServer } from 'node:http'
import type { AddressInfo } from 'node:net'

import autocannon from 'autocannon'
import express from 'express'

import type { BenchLine } from '@/scripts/bench/line'
import type { Product } from '@/scripts/browser/product'
import { benchDesign, benchFrequencies } from '@/scripts/bench/subject'

const CLIENTS = 50
const SECONDS = 10
/** Clients, server and engine share the cores, so a round trip may take this much more than computing alone would. */
const OVERHEAD = 2

/** Median round trip in ms with 50 clients that each ask again as soon as they are answered. */
async function medianRoundTrip(url: string, body: string): Promise<number> {
  const headers = { 'content-type': 'application/json', 'accept-encoding': 'gzip' }
  const result = await autocannon({ url, connections: CLIENTS, duration: SECONDS, method: 'POST', headers, body })
  if (result.non2xx > 0 || result.errors > 0)
    throw new Error(`${url}: ${result.non2xx} refused, ${result.errors} failed`)
  return result.latency.p50
}

async function medianOfEmptyRoute(body: string): Promise<number> {
  const app = express()
  app.post('/', (_req, res) => {
    res.json({})
  })
  const server = createServer(app).listen(0, '127.0.0.1')
  await once(server, 'listening')
  try {
    return await medianRoundTrip(`http://127.0.0.1:${(server.address() as AddressInfo).port}/`, body)
  } finally {
    server.closeAllConnections()
    server.close()
  }
}

/** The most memory that the process has held so far, MB. */
async function peakMemory(pid: number): Promise<number> {
  const status = await readFile(`/proc/${pid}/status`, 'utf8')
  return Number(/VmHWM:\s+(\d+) kB/.exec(status)?.[1]) / 1024
}

/** @param analysisMs - What one analysis takes on one core. */
export async function measureLoad({ origin, pid, threads }: Product, analysisMs: number): Promise<BenchLine[]> {
  const body = JSON.stringify({ design: benchDesign, frequencies: benchFrequencies })
  const roundTrip = await medianRoundTrip(`${origin}/api/v1/analyses`, body)
  return [
    {
      what: `Round trip of an analysis, ${CLIENTS} clients at once, median`,
      measured: roundTrip,
      unit: 'ms',
      goal: (OVERHEAD * CLIENTS * analysisMs) / threads,
    },
    {
      what: `Round trip of an empty Express route, ${CLIENTS} clients at once, median`,
      measured: await medianOfEmptyRoute(body),
      unit: 'ms',
      goal: null,
    },
    { what: 'Most memory of the server under that load', measured: await peakMemory(pid), unit: 'MB', goal: 400 },
  ]
}
