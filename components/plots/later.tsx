/** Plots whose drawing library is as large as the rest of the screens together: it comes when one is to be drawn. */
import { lazy, Suspense, type ComponentType } from 'react'
import { Loading } from '@/components/ui/states'
import type { HistogramPlotProps } from './HistogramPlot'
import type { StepPlotProps } from './StepPlot'
import type { WaveformPlotProps } from './WaveformPlot'

const plots = () => import('./victoryPlots')
const Histogram = lazy(() => plots().then(({ HistogramPlot }) => ({ default: HistogramPlot })))
const Step = lazy(() => plots().then(({ StepPlot }) => ({ default: StepPlot })))
const Waveform = lazy(() => plots().then(({ WaveformPlot }) => ({ default: WaveformPlot })))

function afterwards<P extends { readonly title: string }>(Plot: ComponentType<P>, height: number) {
  return function Later(props: P) {
    return (
      <Suspense fallback={<Loading label={`Drawing: ${props.title}`} bars={[height]} />}>
        <Plot {...props} />
      </Suspense>
    )
  }
}

export const LaterHistogram = afterwards<HistogramPlotProps>(Histogram, 250)
export const LaterStep = afterwards<StepPlotProps>(Step, 220)
export const LaterWaveform = afterwards<WaveformPlotProps>(Waveform, 260)
