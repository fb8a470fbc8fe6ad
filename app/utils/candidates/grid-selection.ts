import type { Ref } from 'vue'
import type { GridApi } from 'ag-grid-community'
import type { Candidate } from '#shared/schemas/candidates'

/** Selected rows of the grid: one by one, a stretch of them, or all that are shown. */
export function useGridSelection(api: Ref<GridApi<Candidate> | null>, told: (ids: string[]) => void) {
  let anchor: string | null = null

  const tell = () => told(api.value?.getSelectedNodes().flatMap(({ data }) => data ? [data.id] : []) ?? [])

  const between = (grid: GridApi<Candidate>, from: number, to: number) => {
    const nodes = []
    for (let index = Math.min(from, to); index <= Math.max(from, to); index++) {
      const node = grid.getDisplayedRowAtIndex(index)
      if (node) nodes.push(node)
    }
    return nodes
  }

  /** Selects a row or lets it go; `upTo` selects the stretch from the row chosen last, and nothing else. */
  const toggle = (row: Candidate, upTo: boolean) => {
    const node = api.value?.getRowNode(row.id)
    const start = anchor === null ? null : api.value?.getRowNode(anchor)?.rowIndex ?? null
    if (!api.value || !node) return
    if (upTo && start !== null && node.rowIndex !== null) {
      api.value.deselectAll()
      api.value.setNodesSelected({ nodes: between(api.value, start, node.rowIndex), newValue: true })
      return
    }
    node.setSelected(!node.isSelected())
    anchor = row.id
  }

  /** A click: Ctrl (Cmd) toggles the row, Shift selects up to it; alone it selects the row by its number, and by a cell nothing. */
  const click = (row: Candidate, byNumber: boolean, { shiftKey, ctrlKey, metaKey }: MouseEvent) => {
    if (shiftKey || ctrlKey || metaKey) toggle(row, shiftKey)
    else only(byNumber ? [row.id] : [])
    if (!shiftKey) anchor = row.id
  }

  const all = () => {
    if (!api.value) return
    api.value.setNodesSelected({ nodes: between(api.value, 0, api.value.getDisplayedRowCount() - 1), newValue: true })
  }

  /** Selects these rows and no others. */
  const only = (ids: readonly string[]) => {
    api.value?.deselectAll()
    const nodes = ids.flatMap(id => api.value?.getRowNode(id) ?? [])
    api.value?.setNodesSelected({ nodes, newValue: true })
    anchor = ids.at(-1) ?? null
  }

  return { tell, toggle, click, all, only }
}
