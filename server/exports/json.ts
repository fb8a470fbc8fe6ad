import { cautions } from '#shared/cautions'
import type { StudyExport } from './study-export'

/** The study as one JSON document, candidates one a line; a page of text at a time. */
export async function* jsonOf(data: StudyExport): AsyncGenerator<string> {
  const { study, members, by, at, version, coreVersion, counts, pinned } = data
  const head = {
    software: `Halfplane ${version}`, coreVersion, exportedBy: by, exportedAt: at.toISOString(), cautions,
    study: { id: study.id, name: study.name, description: study.description, version: study.version, requirements: study.requirements },
    members, counts,
    curves: pinned.map(({ row, curves }) => ({ candidate: row.id, ...curves })),
  }
  yield `${JSON.stringify(head).slice(0, -1)},"candidates":[`
  let separator = '\n'
  for await (const page of data.rows()) {
    for (const { id, version, pin, inputs, state, errors, values, parts } of page) {
      yield separator + JSON.stringify({ id, version, pin, inputs, state, errors, values, parts })
      separator = ',\n'
    }
  }
  yield '\n]}\n'
}
