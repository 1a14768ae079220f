/** Placing marks and labels so that none hides another. Lengths in px, y downwards. */
export interface Box {
  readonly x: number
  readonly y: number
  readonly width: number
  readonly height: number
}

export function overlaps(a: Box, b: Box): boolean {
  return a.x < b.x + b.width && b.x < a.x + a.width && a.y < b.y + b.height && b.y < a.y + a.height
}

function holds(outer: Box, inner: Box): boolean {
  return (
    inner.x >= outer.x &&
    inner.y >= outer.y &&
    inner.x + inner.width <= outer.x + outer.width &&
    inner.y + inner.height <= outer.y + outer.height
  )
}

/** Mean advance of a character as a share of the type's size; a little wide, so that a label never runs over. */
const ADVANCE = { condensed: 0.46, mono: 0.63 } as const

export function textWidth(text: string, size: number, face: keyof typeof ADVANCE): number {
  return text.length * size * ADVANCE[face]
}

/**
 * Moves marks apart along a line until neighbours are `gap` away, each group about the middle of where it belongs.
 * @returns positions in the order given.
 */
export function spread(positions: readonly number[], gap: number): number[] {
  const order = positions.map((_, index) => index).sort((a, b) => positions[a]! - positions[b]!)
  let groups = order.map((index) => ({ members: [index], centre: positions[index]! }))
  for (;;) {
    const at = groups.findIndex((group, index) => {
      const next = groups[index + 1]
      return next !== undefined && start(next, gap) - end(group, gap) < gap - 1e-9
    })
    if (at < 0) break
    const [left, right] = [groups[at]!, groups[at + 1]!]
    const members = [...left.members, ...right.members]
    const centre = members.reduce((sum, index) => sum + positions[index]!, 0) / members.length
    groups = [...groups.slice(0, at), { members, centre }, ...groups.slice(at + 2)]
  }
  const placed = new Array<number>(positions.length)
  for (const group of groups) group.members.forEach((index, rank) => (placed[index] = start(group, gap) + rank * gap))
  return placed
}

interface Group {
  readonly members: readonly number[]
  readonly centre: number
}
const start = (group: Group, gap: number) => group.centre - ((group.members.length - 1) * gap) / 2
const end = (group: Group, gap: number) => group.centre + ((group.members.length - 1) * gap) / 2

export interface LabelRequest {
  /** The point that the label speaks of. */
  readonly x: number
  readonly y: number
  readonly width: number
  readonly height: number
}

const DIRECTIONS = [
  [1, 0],
  [-1, 0],
  [1, -1],
  [-1, -1],
  [1, 1],
  [-1, 1],
  [0, -1],
  [0, 1],
] as const
type Direction = (typeof DIRECTIONS)[number]

/** Distances of a label that stands off in a slanting direction, down or up and to the side. */
const SLOPE = 0.7
/** Every direction at every distance, the places nearest to the point first. */
const PLACES = [9, 20, 34, 52, 74, 100]
  .flatMap((distance) => DIRECTIONS.map((direction) => ({ distance, direction })))
  .sort((a, b) => standOff(a) - standOff(b))

function standOff({ distance, direction: [dx, dy] }: { distance: number; direction: Direction }): number {
  return dx === 0 || dy === 0 ? distance : distance * Math.hypot(1, SLOPE)
}

/**
 * Finds a place beside each point where its label lies inside `frame` and covers neither an obstacle nor an earlier
 * label. Points that come first get the better places; a label that fits nowhere is null and has to be told elsewhere.
 */
export function placeLabels(
  requests: readonly LabelRequest[],
  frame: Box,
  obstacles: readonly Box[],
): readonly (Box | null)[] {
  const taken: Box[] = [...obstacles]
  return requests.map((request) => {
    const box = PLACES.map((place) => beside(request, place.direction, place.distance)).find(
      (candidate) => holds(frame, candidate) && !taken.some((other) => overlaps(other, candidate)),
    )
    if (!box) return null
    taken.push(box)
    return box
  })
}

function beside({ x, y, width, height }: LabelRequest, [dx, dy]: Direction, distance: number): Box {
  const slope = dx === 0 ? 1 : SLOPE
  const left = dx === 0 ? x - width / 2 : dx > 0 ? x + distance : x - distance - width
  const top = dy === 0 ? y - height / 2 : dy > 0 ? y + distance * slope : y - distance * slope - height
  return { x: left, y: top, width, height }
}
