/** Where a statement comes from. Every finding, clause and question carries one, shown beside it. */
export interface Source {
  title: string
  body: string
  year: number | null
  /** `confirmed`: read in the source's text. `from memory`: not re-checked. `common practice`: no single source. `local`: this department's own choice. */
  status: 'confirmed' | 'from memory' | 'common practice' | 'local'
}
