import type { IHeaderComp, IHeaderParams } from 'ag-grid-community'
import type { Column } from '#shared/columns'
import type { Sort } from './arrange'

export type HeaderParams = { column: Column, sort: () => Sort | null, onSort: (column: string) => void }

/** Head of a column: title, unit below it, and the direction where the rows are sorted by it. A click sorts. */
export class GridHeader implements IHeaderComp {
  private readonly gui = document.createElement('div')
  private readonly mark = document.createElement('span')
  private params!: IHeaderParams & { heading: HeaderParams }

  init(params: IHeaderParams & { heading: HeaderParams }) {
    this.params = params
    const { column, onSort } = params.heading
    this.gui.className = 'grid-head'
    this.gui.title = column.meaning
    const title = document.createElement('span')
    title.className = 'grid-head-title'
    title.textContent = column.title
    const unit = document.createElement('span')
    unit.className = 'grid-head-unit'
    unit.textContent = column.unit ?? ''
    this.mark.className = 'grid-head-sort'
    const foot = document.createElement('span')
    foot.className = 'grid-head-foot'
    foot.append(unit, this.mark)
    this.gui.append(title, foot)
    this.gui.addEventListener('click', () => onSort(column.id))
    this.show()
  }

  getGui() {
    return this.gui
  }

  refresh() {
    this.show()
    return true
  }

  private show() {
    const { column, sort } = this.params.heading
    const now = sort()
    const own = now?.column === column.id ? now : null
    this.mark.textContent = own ? own.descending ? '↓ falling' : '↑ rising' : ''
    // The grid takes the attribute off columns that it does not sort itself, right after it has drawn their heads.
    queueMicrotask(() => this.params.eGridHeader.setAttribute('aria-sort', own ? own.descending ? 'descending' : 'ascending' : 'none'))
  }
}
