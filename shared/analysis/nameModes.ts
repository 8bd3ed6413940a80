import type { Six } from './massProperties.ts';

/** Effective mass, over the whole, from which a direction names a mode. */
const NAMES_TRANSLATION = 0.1;
const NAMES_ROTATION = 0.1;
/** A second horizontal direction with this share of the first is named too. */
const SHARES_DIRECTION = 0.5;
/** Kinetic energy that the fewest members hold together for a mode to be theirs alone. */
const LOCAL_ENERGY = 0.75;
/** Of the members, and of the mass, that may take part in a local mode. */
const LOCAL_MEMBERS = 0.25;
const LOCAL_MASS = 0.3;
/** Effective mass in every direction under which a mode can be local. */
const LOCAL_EFFECTIVE = 0.05;
/** Mean square shift, over the turn, under which points stay where they are. */
const STAYS = 1e-6;
/** Mean square turn, over the shift, above which a rigid motion counts as turning. */
const TURNS = 1e-6;
/** Members named in a local mode; the rest are counted. */
const MOST_NAMED = 2;

/** What the name of a mode is decided from. */
export interface ModeCharacter {
  readonly rigid: boolean;
  /** Effective mass over the rigid whole, by direction; 0 where the whole is 0. */
  readonly effectiveShares: Six;
  /** Share of the kinetic energy of each member. */
  readonly memberShares: readonly {
    readonly name: string;
    readonly energy: number;
    readonly mass: number;
  }[];
  /** Mean square displacement of the nodes and stations along X, Y, Z. */
  readonly meanSquares: readonly [number, number, number];
  /** Mean square rotation about X, Y, Z times the square of the frame's size: comparable with the above. */
  readonly meanTurns: readonly [number, number, number];
}

export interface ModeName {
  readonly name: string;
  readonly kind: 'rigid' | 'global' | 'local';
}

const AXES = ['X', 'Y', 'Z'] as const;
const largestIndex = (values: readonly number[]) =>
  values.reduce((best, value, i) => (value > values[best]! ? i : best), 0);

/**
 * Plain names of modes, in order. The rule:
 *  - a rigid-body mode that turns anything is "rigid: turns about …", one that only shifts "rigid: moves along …",
 *    by the axis in which its points do so most;
 *  - "local: …" names the members that hold three quarters of the kinetic energy, where they are at most a
 *    quarter of the members and 30 % of the mass and no direction has 5 % effective mass;
 *  - else the largest translational effective mass of 10 % or more names it: "sways along X" (or Y, or both),
 *    "bounces along Z"; else the largest rotational one: "twists about Z", "rocks about X";
 *  - else, with no net motion, "bends along" the axis in which the points move most, or "twists about" it.
 * A name that comes again gets its ordinal: "bends along Z, 2nd".
 */
export function nameModes(modes: readonly ModeCharacter[]): ModeName[] {
  const seen = new Map<string, number>();
  return modes.map((mode) => {
    const { name, kind } = nameMode(mode);
    if (kind === 'rigid') return { name, kind };
    const times = (seen.get(name) ?? 0) + 1;
    seen.set(name, times);
    return { name: times === 1 ? name : `${name}, ${ordinal(times)}`, kind };
  });
}

function nameMode(mode: ModeCharacter): ModeName {
  const along = mode.effectiveShares.slice(0, 3);
  const about = mode.effectiveShares.slice(3);
  const direction = largestIndex(along);
  const axis = largestIndex(about);
  if (mode.rigid) {
    return { name: `rigid: ${rigidMotion(mode)}`, kind: 'rigid' };
  }
  const local = localMembers(mode);
  if (local !== null) return { name: `local: ${local}`, kind: 'local' };
  if (along[direction]! >= NAMES_TRANSLATION) {
    return { name: translation(along, direction), kind: 'global' };
  }
  if (about[axis]! >= NAMES_ROTATION) {
    const verb = axis === 2 || onlyTurns(mode) ? 'twists' : 'rocks';
    return { name: `${verb} about ${AXES[axis]!}`, kind: 'global' };
  }
  const most = largestIndex(mode.meanSquares);
  return onlyTurns(mode)
    ? { name: `twists about ${AXES[largestIndex(mode.meanTurns)]!}`, kind: 'global' }
    : { name: `bends along ${AXES[most]!}`, kind: 'global' };
}

/** A straight shaft in torsion: its points stay where they are. */
function onlyTurns({ meanSquares, meanTurns }: ModeCharacter): boolean {
  return Math.max(...meanSquares) < STAYS * Math.max(...meanTurns);
}

function rigidMotion({ meanSquares, meanTurns }: ModeCharacter): string {
  const turn = largestIndex(meanTurns);
  const shift = largestIndex(meanSquares);
  return meanTurns[turn]! > TURNS * meanSquares[shift]!
    ? `turns about ${AXES[turn]!}`
    : `moves along ${AXES[shift]!}`;
}

function translation(along: readonly number[], direction: number): string {
  if (direction === 2) return 'bounces along Z';
  const other = 1 - direction;
  return along[other]! >= SHARES_DIRECTION * along[direction]!
    ? 'sways along X and Y'
    : `sways along ${AXES[direction]!}`;
}

function localMembers(mode: ModeCharacter): string | null {
  if (mode.effectiveShares.some((share) => share >= LOCAL_EFFECTIVE)) return null;
  const byEnergy = [...mode.memberShares].sort((a, b) => b.energy - a.energy);
  const movers: string[] = [];
  let energy = 0;
  let mass = 0;
  for (const member of byEnergy) {
    if (energy >= LOCAL_ENERGY) break;
    energy += member.energy;
    mass += member.mass;
    movers.push(member.name);
  }
  const few = movers.length <= LOCAL_MEMBERS * mode.memberShares.length && mass <= LOCAL_MASS;
  if (energy < LOCAL_ENERGY || !few) return null;
  const more = movers.length - MOST_NAMED;
  const named = movers.slice(0, MOST_NAMED).join(', ');
  return more > 0 ? `${named} and ${more} more` : named;
}

function ordinal(n: number): string {
  const teens = n % 100 >= 11 && n % 100 <= 13;
  const ending = teens ? undefined : { 1: 'st', 2: 'nd', 3: 'rd' }[n % 10];
  return `${n}${ending ?? 'th'}`;
}
