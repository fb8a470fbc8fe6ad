import type { ICellEditorComp, ICellEditorParams } from 'ag-grid-community'
import type { Candidate } from '#shared/schemas/candidates'
import type { InputColumn } from '#shared/columns'

export type EditorParams = { column: InputColumn, textOf: (row: Candidate) => string }

/**
 * Editor of an input cell. A printable key replaces the text, anything else opens it as it stands,
 * a refused text included, so that it can be put right.
 */
export class GridEditor implements ICellEditorComp<Candidate, string> {
  private gui!: HTMLInputElement | HTMLSelectElement
  private params!: ICellEditorParams<Candidate, string> & { entry: EditorParams }
  private typed = false

  init(params: ICellEditorParams<Candidate, string> & { entry: EditorParams }) {
    this.params = params
    const { column, textOf } = params.entry
    const text = textOf(params.data)
    const key = params.eventKey ?? ''
    this.gui = column.choices ? this.list(column.choices, text, key) : this.line(text, key)
    this.gui.className = `grid-editor${column.type === 'number' ? ' grid-editor-number' : ''}`
    this.gui.setAttribute('aria-label', column.title)
  }

  private line(text: string, key: string) {
    const input = document.createElement('input')
    this.typed = key.length === 1
    input.value = this.typed ? key : text
    input.autocomplete = 'off'
    input.spellcheck = false
    return input
  }

  private list(choices: NonNullable<InputColumn['choices']>, text: string, key: string) {
    const select = document.createElement('select')
    for (const { value, title } of choices) select.append(new Option(title || '(none)', value))
    const chosen = choices.find(choice => choice.title === text)
    const begun = key.length === 1 ? choices.find(choice => choice.title.toLowerCase().startsWith(key.toLowerCase())) : undefined
    select.value = (begun ?? chosen ?? choices[0])?.value ?? ''
    return select
  }

  afterGuiAttached() {
    this.gui.focus()
    if (this.gui instanceof HTMLInputElement && !this.typed) this.gui.select()
    if (this.gui instanceof HTMLSelectElement) this.open(this.gui)
  }

  /** Shows the list at once; a choice made there ends the editing. */
  private open(select: HTMLSelectElement) {
    try {
      select.showPicker()
    } catch {
      // Without a key press or click of the reader the browser keeps the list closed: arrow keys choose.
      return
    }
    select.addEventListener('change', () => this.params.stopEditing(true))
  }

  getGui() {
    return this.gui
  }

  getValue() {
    return this.gui.value
  }
}
