import { activityEntry, activityQuery } from '#shared/schemas/activity'
import { eventsQuery } from '#shared/schemas/events'
import { listOf } from '#shared/schemas/common'
import { member, memberChange } from '#shared/schemas/members'
import { studiesQuery, study, studyChange, studyCreation, studySummary } from '#shared/schemas/studies'
import { tagged } from './operation'

const stale = 'The study has another version now; `current` is the study as it is, `sent` the change.'

export const studyOperations = tagged('Studies', {
  'GET /api/studies': { summary: 'The caller\'s studies, what changed last first; administrators see all.', query: studiesQuery, answer: listOf(studySummary) },
  'POST /api/studies': { summary: 'Creates a study that the caller owns, or duplicates one.', body: studyCreation, status: 201, answer: study },
  'GET /api/studies/:id': { summary: 'A study with its requirements.', answer: study },
  'PATCH /api/studies/:id': {
    summary: 'Changes name, description or requirements, archives or takes out of the archive.',
    body: studyChange, answer: study, versioned: true, refusals: { 409: `${stale} Or: the study is archived, and the change does not take it back into work.` },
  },
  'DELETE /api/studies/:id': { summary: 'Deletes a study; an owner can restore it for 30 days.', status: 204, versioned: true, refusals: { 409: stale } },
  'POST /api/studies/:id/restore': { summary: 'Brings a deleted study back.', answer: study },
  'GET /api/studies/:id/members': { summary: 'The people of a study.', answer: listOf(member) },
  'PUT /api/studies/:id/members': { summary: 'Adds a person or changes their role. A study always keeps an owner.', body: memberChange, answer: member },
  'DELETE /api/studies/:id/members/:user': { summary: 'Removes a person, who loses access at once. A study always keeps an owner.', status: 204 },
  'GET /api/studies/:id/activity': { summary: 'Who did what in the study, the latest first.', query: activityQuery, answer: listOf(activityEntry) },
  'GET /api/studies/:id/events': {
    summary: 'What changes in the study, as server-sent events. Each carries the number of the last change in it; Last-Event-ID, or `after` where a page cannot send that, brings what was missed.',
    query: eventsQuery, media: 'text/event-stream',
  },
})

export const exportOperations = tagged('Exports', {
  'GET /api/studies/:id/export.xlsx': { summary: 'The study as a workbook.', media: 'application/vnd.openxmlformats-officedocument.spreadsheetml.sheet' },
  'GET /api/studies/:id/export.csv': { summary: 'The rows as CSV with full numbers.', media: 'text/csv' },
  'GET /api/studies/:id/export.json': { summary: 'The study with all its rows as JSON.', media: 'application/json' },
})
