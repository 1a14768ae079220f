import { useMemo } from 'react'
import Svg, { Circle, G, Line, Path, Rect } from 'react-native-svg'
import { placeLabels, textWidth, type Box } from './layout'
import { PoleMark, ZeroMark } from './marks'
import { PlotFrame } from './PlotFrame'
import { PlotText } from './PlotText'
import {
  partsOnPlane,
  placeOf,
  planeOf,
  radiusShare,
  thinned,
  type Plane,
  type PlanePoint,
  type PlaneRoot,
} from './sPlane'
import { decadeLabel } from './ticks'
import { figure, ratio } from '@/components/format'
import { ROLE_NAMES, SHORT_NAMES } from '@/components/roots'
import type { Palette } from '@/constants/theme'
import { useTheme } from '@/hooks/useTheme'

export interface PoleZeroMapProps {
  readonly title: string
  readonly fileName: string
  /** One of each conjugate pair. */
  readonly roots: readonly PlaneRoot[]
  /** Many places behind the roots, as dots. */
  readonly cloud?: readonly PlanePoint[]
  /** Ways that the poles take, as lines. */
  readonly branches?: readonly (readonly PlanePoint[])[]
  /** Said to those who listen, in place of the list of roots. */
  readonly summary?: string
}

const FOOT = 40 // px below the real axis
const HEAD = 26
const SIDE = 10
const LEAST_RING_STEP = 36 // px
const DAMPINGS = [0.2, 0.5, 0.8] as const

/** Poles and zeros in the s-plane: direction is damping, distance is frequency. */
export function PoleZeroMap({ title, fileName, roots, cloud = NONE, branches = NONE, summary }: PoleZeroMapProps) {
  const listed = roots.length === 0 ? 'No poles or zeros.' : roots.map(describe).join('. ')
  return (
    <PlotFrame
      title={title}
      fileName={fileName}
      summary={summary ?? listed}
      table={() => ({
        header: ['Kind', 'Hz', 'Real, rad/s', 'Imaginary, rad/s', 'Damping'],
        rows: [
          ...roots.map(({ root, kind }) => [
            `${kind === 'pole' ? '×' : '○'} ${ROLE_NAMES[root.role]}`,
            figure(root.frequency, 'Hz'),
            root.real.toExponential(3),
            root.imaginary.toExponential(3),
            ratio(root.dampingRatio),
          ]),
          ...everyFew(cloud).map((point) => [
            '· sample',
            figure(point.frequency, 'Hz'),
            point.real.toExponential(3),
            point.imaginary.toExponential(3),
            ratio(dampingOf(point)),
          ]),
        ],
        data: [
          ...roots.map(({ root, kind }) => [
            kind === 'pole' ? 1 : 0,
            root.frequency,
            root.real,
            root.imaginary,
            root.dampingRatio,
          ]),
          ...[...cloud, ...branches.flat()].map((point) => [
            1,
            point.frequency,
            point.real,
            point.imaginary,
            dampingOf(point),
          ]),
        ],
      })}
    >
      {(width) => <Map roots={roots} cloud={cloud} branches={branches} width={width} />}
    </PlotFrame>
  )
}

const NONE: readonly never[] = []
const ROWS = 40
const everyFew = (points: readonly PlanePoint[]) =>
  points.filter((_, index) => index % Math.max(1, Math.ceil(points.length / ROWS)) === 0)
const dampingOf = ({ real, imaginary }: PlanePoint) => -real / Math.hypot(real, imaginary)

function describe({ root, kind }: PlaneRoot): string {
  const where = root.halfPlane === 'right' ? ', in the right half plane' : ''
  return `${ROLE_NAMES[root.role]}: ${kind} at ${figure(root.frequency, 'Hz')}, damping ${ratio(root.dampingRatio)}${where}`
}

interface Frame {
  readonly width: number
  readonly height: number
  readonly centre: number
  readonly axis: number
  readonly radius: number
}

/** The right half takes less room when nothing stands in it. */
function frameOf(width: number, points: readonly PlanePoint[]): Frame {
  const hasRight = points.some(({ real }) => real > 0)
  const share = hasRight ? 0.5 : 0.74
  const radius = Math.min(share * width - SIDE, 330)
  const centre = Math.min(share * width, width - (hasRight ? radius + SIDE : 0.26 * width))
  return { width, height: radius + HEAD + FOOT, centre, axis: radius + HEAD, radius }
}

interface MapProps extends Required<Pick<PoleZeroMapProps, 'roots' | 'cloud' | 'branches'>> {
  readonly width: number
}

const CLOUD_CELLS = 140 // along the radius

function Map({ roots, cloud, branches, width }: MapProps) {
  const theme = useTheme()
  const { plane, dots, ways } = useMemo(() => {
    const found = planeOf([...roots.map(({ root }) => root), ...cloud])
    return {
      plane: found,
      dots: thinned(cloud, found, CLOUD_CELLS),
      ways: branches.flatMap((branch) => partsOnPlane(branch, found)),
    }
  }, [roots, cloud, branches])
  const frame = frameOf(width, [...roots.map(({ root }) => root), ...dots, ...ways.flat()])
  const onFrame = (point: PlanePoint) => {
    const { x, y } = placeOf(plane, point)
    return { x: frame.centre + x * frame.radius, y: frame.axis - y * frame.radius }
  }
  const marks = roots.map((item) => ({ item, ...onFrame(item.root) }))
  const texts = marks.map(({ item }) => `${SHORT_NAMES[item.root.role]} ${figure(item.root.frequency, 'Hz')}`)
  const obstacles: Box[] = [
    ...marks.map(({ x, y }) => ({ x: x - 6, y: y - 6, width: 12, height: 12 })),
    { x: 0, y: 0, width: 90, height: 22 },
    { x: width - 60, y: 0, width: 60, height: 22 },
    // The ring labels under the real axis and along it.
    { x: 0, y: frame.axis - 2, width, height: 4 },
    { x: 0, y: frame.axis + 3, width, height: 16 },
  ]
  const boxes = placeLabels(
    marks.map(({ x, y }, index) => ({ x, y, width: textWidth(texts[index]!, 13.4, 'condensed') + 4, height: 17 })),
    { x: 2, y: 2, width: width - 4, height: frame.axis - 4 },
    obstacles,
  )
  return (
    <Svg width={width} height={frame.height} aria-hidden>
      <Ground frame={frame} plane={plane} theme={theme} />
      {ways.map((way, index) => (
        <Path
          key={`way ${index}`}
          d={`M${way
            .map((point) => onFrame(point))
            .map(({ x, y }) => `${x.toFixed(1)} ${y.toFixed(1)}`)
            .join('L')}`}
          stroke={theme.accent}
          strokeWidth={1.4}
          strokeLinejoin="round"
          fill="none"
        />
      ))}
      {dots.map((point, index) => {
        const { x, y } = onFrame(point)
        return <Circle key={`dot ${index}`} cx={x} cy={y} r={1.7} fill={theme.gain} fillOpacity={0.55} />
      })}
      {marks.map(({ item, x, y }, index) => {
        const color = item.owner === 'stage' ? theme.gain : theme.accent
        const box = boxes[index]
        return (
          <G key={index}>
            {box ? (
              <>
                <Leader x={x} y={y} box={box} color={color} />
                <PlotText x={box.x + 2} y={box.y + 13} color={color} isStrong halo={theme.sheet}>
                  {texts[index]}
                </PlotText>
              </>
            ) : null}
            {item.kind === 'pole' ? (
              <PoleMark x={x} y={y} color={color} size={5.5} />
            ) : (
              <ZeroMark x={x} y={y} color={color} size={5.5} ground={theme.sheet} />
            )}
          </G>
        )
      })}
    </Svg>
  )
}

/** A hair from a mark to its label where the label had to stand off. */
function Leader({ x, y, box, color }: { x: number; y: number; box: Box; color: string }) {
  const toX = Math.min(box.x + box.width, Math.max(box.x, x))
  const toY = Math.min(box.y + box.height, Math.max(box.y, y))
  if (Math.hypot(toX - x, toY - y) < 16) return null
  return <Line x1={x} y1={y} x2={toX} y2={toY} stroke={color} strokeWidth={0.8} />
}

function Ground({ frame, plane, theme }: { frame: Frame; plane: Plane; theme: Palette }) {
  const { width, height, centre, axis, radius } = frame
  const arc = (r: number) => `M${centre - r} ${axis}A${r} ${r} 0 0 1 ${centre + r} ${axis}`
  return (
    <G>
      <Rect x={0} y={0} width={width} height={height} fill={theme.sheet} />
      <Rect x={centre} y={0} width={Math.max(0, width - centre)} height={axis} fill={theme.shortWash} />
      {plane.rings.map((ring) => (
        <Path key={ring} d={arc(radiusShare(plane, ring) * radius)} stroke={theme.rule} strokeWidth={1} fill="none" />
      ))}
      {DAMPINGS.map((damping) => {
        const [x, y] = [centre - damping * radius, axis - Math.sqrt(1 - damping ** 2) * radius]
        return (
          <G key={damping}>
            <Line x1={centre} y1={axis} x2={x} y2={y} stroke={theme.rule} strokeDasharray="3 3" />
            <PlotText x={x} y={Math.max(18, y - 4)} color={theme.quiet} anchor="middle" halo={theme.sheet}>
              {`ζ ${damping}`}
            </PlotText>
          </G>
        )
      })}
      <Line x1={0} x2={width} y1={axis} y2={axis} stroke={theme.ink} strokeWidth={1.2} />
      <Line x1={centre} x2={centre} y1={HEAD - 14} y2={axis} stroke={theme.ink} strokeWidth={1.2} />
      <RingLabels frame={frame} plane={plane} theme={theme} />
      <PlotText x={6} y={16} color={theme.quiet}>
        decays
      </PlotText>
      <PlotText x={width - 6} y={16} color={theme.quiet} anchor="end">
        grows
      </PlotText>
      <PlotText x={centre} y={height - 6} color={theme.quiet} anchor="middle">
        Distance from the origin: Hz
      </PlotText>
    </G>
  )
}

function RingLabels({
  frame: { centre, axis, radius, width },
  plane,
  theme,
}: {
  frame: Frame
  plane: Plane
  theme: Palette
}) {
  // Every ring has its label where they stand far enough apart, every second one otherwise.
  const stride = radius / plane.decades < LEAST_RING_STEP ? 2 : 1
  return plane.rings.map((ring, index) => {
    if ((plane.rings.length - 1 - index) % stride !== 0) return null
    const r = radiusShare(plane, ring) * radius
    const label = decadeLabel(Math.round(Math.log10(ring)))
    const sides = centre + r < width - 12 ? [centre - r, centre + r] : [centre - r]
    return (
      <G key={ring}>
        {sides.map((x) => (
          <PlotText key={x} x={Math.max(14, x)} y={axis + 16} color={theme.quiet} anchor="middle">
            {label}
          </PlotText>
        ))}
      </G>
    )
  })
}
