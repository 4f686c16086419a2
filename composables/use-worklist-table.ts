import type { ComputedRef, Ref } from 'vue'
import {
  createColumnHelper, createSortedRowModel, rowSortingFeature, sortFn_alphanumeric, tableFeatures, useTable,
} from '@tanstack/vue-table'
import { computed, ref, watch } from 'vue'

/** A column of a worklist; one without `value` cannot be sorted. */
export interface WorklistColumn<Row> { id: string, label: string, value?: (row: Row) => string | number }

export interface WorklistHeader {
  id: string
  label: string
  sortable: boolean
  /** For aria-sort, on the sorted header only. */
  sorted: 'ascending' | 'descending' | undefined
  toggle: () => void
}

export interface WorklistTable<Row> {
  headers: ComputedRef<WorklistHeader[]>
  rows: ComputedRef<Row[]>
  /** The column that orders the rows; null while they stand as the server sent them. */
  sortedBy: ComputedRef<string | null>
}

const features = tableFeatures({
  rowSortingFeature,
  sortedRowModel: createSortedRowModel(),
  sortFns: { alphanumeric: sortFn_alphanumeric },
})

/** Sorts the rows that are shown; the order of the server is the first, and comes back with the third press. */
export function useWorklistTable<Row extends { id: string }>(data: Ref<Row[]>, columns: readonly WorklistColumn<Row>[]): WorklistTable<Row> {
  const helper = createColumnHelper<typeof features, Row>()
  const table = useTable({
    features,
    columns: helper.columns(columns.map(column => helper.accessor(row => column.value?.(row) ?? '', {
      id: column.id, header: column.label, enableSorting: column.value !== undefined, sortFn: 'alphanumeric', sortDescFirst: false,
    }))),
    data: data.value,
    getRowId: (row: Row) => row.id,
  })
  // The table reads its options without tracking them: hand new rows over at once and say that they changed.
  const changes = ref(0)
  watch(data, (rows) => {
    table.setOptions(options => ({ ...options, data: rows }))
    changes.value += 1
  }, { flush: 'sync' })
  const sorting = computed(() => table.atoms.sorting.get())
  return {
    headers: computed(() => columns.map((column) => {
      const state = sorting.value.find(sorted => sorted.id === column.id)
      return {
        id: column.id,
        label: column.label,
        sortable: column.value !== undefined,
        sorted: state === undefined ? undefined : state.desc ? 'descending' as const : 'ascending' as const,
        toggle: () => table.getColumn(column.id)?.toggleSorting(),
      }
    })),
    rows: computed(() => {
      void changes.value
      void sorting.value
      return table.getRowModel().rows.map(row => row.original)
    }),
    sortedBy: computed(() => sorting.value[0]?.id ?? null),
  }
}
