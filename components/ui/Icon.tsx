import Svg, { Circle, Path } from 'react-native-svg'

/** Drawn for this product on a 24 px grid, one stroke weight. */
const PATHS = {
  stage: 'M2 12h4l2.5-6 4 12 3-9 1.5 3h5',
  plant: 'M4 4l5 5M9 4l-5 5',
  loop: 'M20 8H8a5 5 0 0 0 0 10h8m-3-3.5L16.5 18 13 21.5',
  spread: 'M3 20h18M4 17c6 0 4-12 8-12s2 12 8 12',
  plus: 'M12 5v14M5 12h14',
  close: 'M6 6l12 12M18 6L6 18',
  link: 'M10 14a4 4 0 0 0 5.7 0l3-3a4 4 0 0 0-5.7-5.7l-1 1M14 10a4 4 0 0 0-5.7 0l-3 3a4 4 0 0 0 5.7 5.7l1-1',
  table: 'M4 5h16v14H4zM4 10h16M10 10v9',
  curve: 'M4 4v16h16M7 8c5 0 5 8 12 8',
  download: 'M12 4v11m-4.5-4.5L12 15l4.5-4.5M5 20h14',
  undo: 'M8 5L4 9l4 4M4 9h10a5 5 0 0 1 0 10H9',
  edit: 'M4 20l1-4L16 5l3 3L8 19z',
  remove: 'M5 12h14',
  chevron: 'M6 9l6 6 6-6',
  more: 'M4 7h16M4 12h16M4 17h16',
  arrow: 'M4 12h15m-5-5l5 5-5 5',
} as const

export type IconName = keyof typeof PATHS

export function Icon({ name, color, size = 22 }: { name: IconName; color: string; size?: number }) {
  return (
    <Svg width={size} height={size} viewBox="0 0 24 24" aria-hidden>
      <Path d={PATHS[name]} stroke={color} strokeWidth={1.8} fill="none" strokeLinecap="round" strokeLinejoin="round" />
      {name === 'plant' ? <Circle cx={16.5} cy={16.5} r={3.2} stroke={color} strokeWidth={1.8} fill="none" /> : null}
    </Svg>
  )
}
