import { describe, expect, it } from 'vitest'
import { effectScope, ref } from 'vue'
import { useWorklistTable } from '~/composables/use-worklist-table'

interface Line { id: string, exam: string, minutes: number }

function open() {
  const data = ref<Line[]>([
    { id: '1', exam: 'MRI pituitary', minutes: 40 },
    { id: '2', exam: 'MRI brain', minutes: 30 },
    { id: '3', exam: 'MRI knee', minutes: 100 },
  ])
  const table = effectScope().run(() => useWorklistTable(data, [
    { id: 'exam', label: 'Exam', value: (row: Line) => row.exam },
    { id: 'minutes', label: 'Minutes', value: (row: Line) => row.minutes },
    { id: 'needs', label: 'Still needed' },
  ]))
  if (!table) throw new Error('the scope ran nothing')
  const press = (id: string) => table.headers.value.find(header => header.id === id)?.toggle()
  return { data, table, press, ids: () => table.rows.value.map(row => row.id).join('') }
}

describe('a worklist table', () => {
  it('keeps the order of the server until a header is pressed', () => {
    expect(open().ids()).toBe('123')
  })

  it('sorts upward, then downward, then returns to the order of the server', () => {
    const { press, ids, table } = open()
    press('exam')
    expect(ids()).toBe('231')
    expect(table.headers.value.map(header => header.sorted)).toEqual(['ascending', undefined, undefined])
    press('exam')
    expect(ids()).toBe('132')
    press('exam')
    expect(ids()).toBe('123')
    expect(table.sortedBy.value).toBeNull()
  })

  it('sorts numbers by size', () => {
    const { press, ids } = open()
    press('minutes')
    expect(ids()).toBe('213')
  })

  it('offers no sorting where a column has nothing to sort by', () => {
    expect(open().table.headers.value.at(-1)).toMatchObject({ sortable: false })
  })

  it('shows new rows as soon as they are there', () => {
    const { data, ids } = open()
    data.value = [...data.value, { id: '4', exam: 'MRI hip', minutes: 35 }]
    expect(ids()).toBe('1234')
  })
})
