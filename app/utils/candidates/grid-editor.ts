import type { ICellEditorComp, ICellEditorParams } from 'ag-grid-community'
import type { Candidate } from '#shared/schemas/candidates'
import type { InputColumn } from '#shared/columns'
import { PresetList } from './preset-list'

export type EditorParams = { column: InputColumn, textOf: (row: Candidate) => string }

/**
 * Editor of an input cell. A printable key replaces the text, anything else opens it as it stands,
 * a refused text included, so that it can be put right. What it hands back is always text as the cell shows it: of a list
 * the title, never the value behind it. The list stays closed until the reader opens it, for Escape would close that first.
 * Presets stand under the line, in a box over the cell.
 */
export class GridEditor implements ICellEditorComp<Candidate, string> {
  private gui!: HTMLInputElement | HTMLSelectElement
  private presets: PresetList | null = null
  private box: HTMLElement | null = null
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
    if (column.presets && this.gui instanceof HTMLInputElement) this.box = this.boxOf(this.gui, column.presets, column.title)
  }

  private boxOf(input: HTMLInputElement, presets: NonNullable<InputColumn['presets']>, title: string) {
    this.presets = new PresetList(input, presets, title, () => this.params.stopEditing(true))
    const box = document.createElement('div')
    box.className = 'preset-box'
    box.style.minWidth = `${this.params.eGridCell.offsetWidth}px`
    box.append(input, this.presets.element)
    return box
  }

  isPopup() {
    return this.box !== null
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
    for (const { title } of choices) select.append(new Option(title || '(none)', title))
    const begun = key.length === 1 ? choices.find(choice => choice.title.toLowerCase().startsWith(key.toLowerCase())) : undefined
    select.value = begun?.title ?? text
    this.endByMouse(select)
    return select
  }

  afterGuiAttached() {
    this.gui.focus()
    if (this.gui instanceof HTMLInputElement && !this.typed) this.gui.select()
  }

  /** A choice by mouse ends the editing; arrow keys change the closed list at every step and leave the end to Enter. */
  private endByMouse(select: HTMLSelectElement) {
    let byMouse = false
    select.addEventListener('pointerdown', () => {
      byMouse = true
    })
    select.addEventListener('keydown', () => {
      byMouse = false
    })
    select.addEventListener('change', () => {
      if (byMouse) this.params.stopEditing(true)
    })
  }

  getGui() {
    return this.box ?? this.gui
  }

  getValue() {
    return this.presets?.title ?? this.gui.value
  }
}
