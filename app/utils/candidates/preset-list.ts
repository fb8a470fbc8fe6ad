import type { Preset } from '#shared/columns'

/**
 * A list of presets under a line of free entry. The arrow keys go through it and put each preset's text into the line,
 * where it can be changed; what is typed is no preset any more.
 */
export class PresetList {
  readonly element = document.createElement('ul')
  private options: HTMLLIElement[]
  private chosen = -1

  /** @param taken called when a preset is chosen by mouse, after the line has its text */
  constructor(private input: HTMLInputElement, private presets: readonly Preset[], title: string, taken: () => void) {
    // One editor is open at a time.
    this.element.id = 'preset-list'
    this.element.className = 'preset-list'
    this.element.setAttribute('role', 'listbox')
    this.element.setAttribute('aria-label', `${title}: presets`)
    this.options = presets.map((preset, i) => this.option(preset, i, taken))
    this.element.append(...this.options)
    // The line keeps the focus: losing it would end the editing before the click has arrived.
    this.element.addEventListener('mousedown', event => event.preventDefault())
    for (const [name, value] of [['role', 'combobox'], ['aria-autocomplete', 'none'], ['aria-expanded', 'true'], ['aria-controls', this.element.id]] as const) {
      input.setAttribute(name, value)
    }
    input.addEventListener('input', () => this.mark(-1))
    input.addEventListener('keydown', this.move)
  }

  /** The chosen preset's title, or null where the line holds free entry. */
  get title(): string | null {
    return this.presets[this.chosen]?.title ?? null
  }

  private option({ title }: Preset, i: number, taken: () => void) {
    const option = document.createElement('li')
    option.id = `${this.element.id}-${i}`
    option.setAttribute('role', 'option')
    option.setAttribute('aria-selected', 'false')
    option.textContent = title
    option.addEventListener('click', () => {
      this.choose(i)
      taken()
    })
    return option
  }

  private move = (event: KeyboardEvent) => {
    if (event.key !== 'ArrowDown' && event.key !== 'ArrowUp') return
    event.preventDefault()
    const [step, count] = [event.key === 'ArrowDown' ? 1 : -1, this.options.length]
    this.choose(this.chosen < 0 && step < 0 ? count - 1 : (this.chosen + step + count) % count)
  }

  private choose(i: number) {
    this.input.value = this.presets[i]!.text
    this.mark(i)
    this.options[i]!.scrollIntoView({ block: 'nearest' })
  }

  private mark(i: number) {
    this.chosen = i
    this.options.forEach((option, n) => option.setAttribute('aria-selected', String(n === i)))
    if (i < 0) this.input.removeAttribute('aria-activedescendant')
    else this.input.setAttribute('aria-activedescendant', this.options[i]!.id)
  }
}
