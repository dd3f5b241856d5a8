import { describe, expect, it } from 'vitest'
import { columns, jointColumns } from '../../../../server/cli/parse-columns'

describe('column names', () => {
  it.each([
    ['centre,density', { layout: 'centre', value: 'density', columns: { low: 0, high: 0, value: 1 } }],
    ['low,high,count', { layout: 'edges', value: 'count', columns: { low: 0, high: 1, value: 2 } }],
    [
      'skip,probability,centre',
      { layout: 'centre', value: 'probability', columns: { low: 2, high: 2, value: 1 } },
    ],
    ['skip,sample', { layout: 'samples', value: 'count', columns: { low: 1, high: 1, value: 1 } }],
  ])('%s says where everything is', (text, choice) => {
    expect(columns(text)).toEqual(choice)
  })

  it.each([
    ['x,y,count', { layout: 'grid', value: 'count', columns: { x: 0, y: 1, value: 2 } }],
    ['y,x', { layout: 'samples', value: 'count', columns: { x: 1, y: 0, value: 0 } }],
  ])('%s says where both coordinates are', (text, choice) => {
    expect(jointColumns(text)).toEqual(choice)
  })

  it.each(['centre', 'low,count', 'centre,count,density', 'sample,count', 'centre,colour', ''])(
    'refuses “%s”',
    (text) => {
      expect(() => columns(text)).toThrow(/\./)
    },
  )
})
