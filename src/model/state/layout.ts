/**
 * The state vector, declared once: nobody else computes an index.
 *
 * Number densities are per unit volume of resting air, 1/m3; accumulators are amounts per unit resting area, 1/m2,
 * counted positive when they enter the column, so that column total minus accumulators is constant in time.
 */
/** Ways in which water enters or leaves. */
export const WATER_ACCOUNTS = [
  'top',
  'bottom',
  'fallout',
  'lateral',
  'photolysis',
  'rebasing',
  'injection',
] as const
/** Ways in which nuclei of a class, free or inside ice, enter or leave. */
export const NUCLEUS_ACCOUNTS = [
  'top',
  'bottom',
  'fallout',
  'lateral',
  'rebasing',
  'injection',
] as const
export type WaterAccount = (typeof WATER_ACCOUNTS)[number]
export type NucleusAccount = (typeof NUCLEUS_ACCOUNTS)[number]

/** Where each part of the state starts. Within a part the classes of one level lie side by side. */
export interface StateLayout {
  length: number
  levels: number
  classes: number
  nucleusClasses: number
  /** Water vapour, one per level. */
  vapour: number
  /** Free nuclei, `nucleusClasses` per level. */
  nuclei: number
  /** Ice particles, `classes` per level. */
  ice: number
  /** Core mix: ice particles with a core of each nucleus class, `nucleusClasses` per level. */
  cores: number
  waterAccount: Record<WaterAccount, number>
  /** Index of the account of the first nucleus class; the others follow. */
  nucleusAccount: Record<NucleusAccount, number>
}

export function makeStateLayout(
  levels: number,
  classes: number,
  nucleusClasses: number,
): StateLayout {
  const vapour = 0
  const nuclei = vapour + levels
  const ice = nuclei + levels * nucleusClasses
  const cores = ice + levels * classes
  const accounts = cores + levels * nucleusClasses
  const nucleusAccounts = accounts + WATER_ACCOUNTS.length
  return {
    length: nucleusAccounts + NUCLEUS_ACCOUNTS.length * nucleusClasses,
    levels,
    classes,
    nucleusClasses,
    vapour,
    nuclei,
    ice,
    cores,
    waterAccount: placed(WATER_ACCOUNTS, accounts, 1),
    nucleusAccount: placed(NUCLEUS_ACCOUNTS, nucleusAccounts, nucleusClasses),
  }
}

function placed<Name extends string>(
  names: readonly Name[],
  start: number,
  width: number,
): Record<Name, number> {
  const entries = names.map((name, i) => [name, start + i * width] as const)
  return Object.fromEntries(entries) as Record<Name, number>
}

/** The quantity and level that an index of the state vector stands for; level null for accounts. */
export function describeIndex(
  layout: StateLayout,
  index: number,
): { quantity: string; level: number | null } {
  const { nuclei, ice, cores, levels, classes, nucleusClasses } = layout
  const accounts = layout.waterAccount.top
  if (index >= accounts) return { quantity: 'budget account', level: null }
  const within = (start: number, width: number) => ({
    level: Math.floor((index - start) / width),
    member: (index - start) % width,
  })
  if (index < nuclei) return { quantity: 'water vapour', level: index }
  const [quantity, start, width] =
    index < ice
      ? ['free nuclei of class', nuclei, nucleusClasses]
      : index < cores
        ? ['ice of class', ice, classes]
        : ['cores of class', cores, nucleusClasses]
  const { level, member } = within(start as number, width as number)
  return { quantity: `${quantity} ${member + 1}`, level: Math.min(level, levels - 1) }
}
