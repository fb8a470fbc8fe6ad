import type { InjectionKey } from 'vue'
import type { Issue } from '#shared/schemas/common'
import { requirements as schema } from '#shared/schemas/requirements'
import type { Requirements } from '#shared/schemas/requirements'
import type { Study } from '#shared/schemas/studies'

/** How a value is called and shown where two of them are offered: its label, its unit, and 100 for per cent. */
export type Words = { label: string, unit?: string, scale?: number }
/** One value that differs from what is saved; `base` is what it was when the reader began to change it. */
export type Edit = { path: Path, words: Words, value: unknown, base: unknown }
/** A value that somebody else changed meanwhile, too. */
export type Conflict = { edit: Edit, theirs: unknown }

const pauseMs = 600

const applied = (base: Requirements, edits: readonly Edit[]) => edits.reduce((all, edit) => writeAt(all, edit.path, edit.value), base)

/** An item that is not there takes no change: it is in an edit of its list that is not saved, or somebody has removed it. */
const reaches = (all: Requirements, { path }: Edit) => readAt(all, path) !== undefined

const issuesOf = (candidate: Requirements): Issue[] =>
  schema.safeParse(candidate).error?.issues.map(issue => ({ path: issue.path.join('.'), message: issue.message })) ?? []

/**
 * The requirements as they are being edited. Each edit is saved after a short pause; those that break a rule are held back
 * with their sentence while the others go out. A stale save is merged where nobody touched the same value, else both are offered.
 */
export function useRequirementsDraft() {
  const store = useStudyStore()
  const edits = ref<Edit[]>([])
  const conflicts = ref<Conflict[]>([])
  const refused = ref<Issue[]>([])
  const failure = ref<string | null>(null)
  const saving = ref(false)
  /** fields whose text stands for no number: what they mean is in no edit yet */
  const unread = ref(new Set<string>())
  let timer: ReturnType<typeof setTimeout> | undefined

  const saved = computed(() => store.requirements as Requirements)
  const draft = computed(() => applied(saved.value, edits.value))
  const issues = computed(() => edits.value.length ? issuesOf(draft.value) : [])

  /** Sentence for the value at a path, or for exactly that list. */
  const problemAt = (path: Path) => {
    const at = dottedPath(draft.value, path)
    return [...issues.value, ...refused.value].find(issue => issue.path === at)?.message
  }

  const mark = (path: Path, readable: boolean) => {
    if (readable) unread.value.delete(path.join('.'))
    else unread.value.add(path.join('.'))
  }

  const edit = (path: Path, value: unknown, words: Words, pause = pauseMs) => {
    const before = edits.value.find(entry => sameValue(entry.path, path))
    const base = before ? before.base : readAt(saved.value, path)
    // A new value of a whole list already holds what was changed inside it.
    const others = edits.value.filter(entry => !isWithin(entry.path, path))
    const idle = !before && sameValue(readAt(applied(saved.value, others), path), value)
    edits.value = idle ? others : [...others, { path, value, words, base }]
    refused.value = []
    clearTimeout(timer)
    timer = setTimeout(() => void flush(), pause)
  }

  const sendable = () => {
    // Two IDs that change places are sound together alone.
    if (issues.value.length === 0) return edits.value
    const sound: Edit[] = []
    for (const entry of edits.value) {
      const next = applied(saved.value, [...sound, entry])
      if (reaches(next, entry) && issuesOf(next).length === 0) sound.push(entry)
    }
    return sound
  }

  const rebase = (current: Study) => {
    conflicts.value = edits.value.map(entry => ({ edit: entry, theirs: readAt(current.requirements, entry.path) }))
      .filter(({ edit: { base, value }, theirs }) => !sameValue(theirs, base) && !sameValue(theirs, value))
    store.adopt(current)
  }

  const fail = (thrown: unknown) => {
    if (thrown instanceof ApiProblem && thrown.status === 409 && thrown.current) return rebase(thrown.current as Study)
    if (thrown instanceof ApiProblem) {
      refused.value = thrown.errors.map(({ path, message }) => ({ path: path.replace(/^requirements\./, ''), message }))
    }
    failure.value = sentenceOf(thrown)
  }

  /** Saves what can be saved now. */
  const flush = async (): Promise<void> => {
    clearTimeout(timer)
    if (saving.value || conflicts.value.length) return
    const sent = sendable()
    if (!sent.length) return
    saving.value = true
    failure.value = null
    try {
      await store.change({ requirements: applied(saved.value, sent) })
      edits.value = edits.value.filter(entry => !sent.some(other => sameValue(other, entry)))
    } catch (thrown) {
      fail(thrown)
    } finally {
      saving.value = false
    }
    if (!failure.value && !conflicts.value.length) await flush()
  }

  /** Settles a conflict, one way for each value, and saves what is left. */
  const settle = (keepMine: (conflict: Conflict) => boolean) => {
    for (const conflict of conflicts.value) {
      edits.value = edits.value.flatMap(entry => !sameValue(entry, conflict.edit)
        ? [entry]
        : keepMine(conflict) ? [{ ...entry, base: conflict.theirs }] : [])
    }
    conflicts.value = []
    edits.value = edits.value.filter(entry => reaches(draft.value, entry))
    return flush()
  }

  const settled = computed(() => edits.value.length === 0 && unread.value.size === 0)

  onScopeDispose(() => clearTimeout(timer))
  return { draft, edits, unread, conflicts, issues, failure, saving, settled, canEdit: computed(() => store.canEdit), problemAt, mark, edit, flush, settle }
}

export type RequirementsDraft = ReturnType<typeof useRequirementsDraft>
export const requirementsDraft: InjectionKey<RequirementsDraft> = Symbol('requirements draft')

/** The draft of the page that a component stands in. */
export function useDraft(): RequirementsDraft {
  const draft = inject(requirementsDraft)
  if (!draft) throw new Error('Only the Requirements page has a draft')
  return draft
}
