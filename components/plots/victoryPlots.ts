/** Every plot that is drawn with Victory, in one piece, so that its library travels once and only when one is drawn. */
export { HistogramPlot } from './HistogramPlot'
export { StepPlot } from './StepPlot'
export { WaveformPlot } from './WaveformPlot'
