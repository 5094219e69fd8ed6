import type { SpringKind } from '#shared/spring/codes'
import type { OrderTextName } from './order-fields'

/** The first question of the order form, as the front page puts it for each kind: rows of two fields, with the words before and between them. */
export type FirstRow = { words: string, between: string, fields: readonly { field: OrderTextName, name: string }[] }

const loads = (does: string): readonly FirstRow[] => [
  { words: `It ${does} with`, between: 'at', fields: [{ field: 'firstForce', name: 'First load' }, { field: 'firstLength', name: 'Length at the first load' }] },
  { words: 'and with', between: 'at', fields: [{ field: 'secondForce', name: 'Second load' }, { field: 'secondLength', name: 'Length at the second load' }] },
]

export const FIRST_QUESTION: Readonly<Record<SpringKind, { legend: string, hint: string, rows: readonly FirstRow[] }>> = {
  compression: { legend: 'Two loads, each at a length', hint: 'The lengths are of the spring itself, end to end, under that load.', rows: loads('pushes') },
  extension: { legend: 'Two loads, each at a length', hint: 'The lengths are inside the hooks, from where one is held to where the other is.', rows: loads('pulls') },
  torsion: {
    legend: 'Two moments, each at an angle', hint: 'The angles are counted from any place you choose, the way the spring is turned.',
    rows: [
      { words: 'It turns with', between: 'at', fields: [{ field: 'firstMoment', name: 'First moment' }, { field: 'firstAngle', name: 'Angle at the first moment' }] },
      { words: 'and with', between: 'at', fields: [{ field: 'secondMoment', name: 'Second moment' }, { field: 'secondAngle', name: 'Angle at the second moment' }] },
      { words: 'on legs of', between: 'and', fields: [{ field: 'firstLeg', name: 'Length of the first leg' }, { field: 'secondLeg', name: 'Length of the second leg' }] },
    ],
  },
}

/** Fields that the front page asks for a kind. */
export const firstFields = (kind: SpringKind): OrderTextName[] => FIRST_QUESTION[kind].rows.flatMap(row => row.fields.map(({ field }) => field))
