import { z } from 'zod'
import { candidate, candidateChange, candidateMove, candidateSelection, candidatesCreation, pinChange } from '#shared/schemas/candidates'
import { listOf, pageQuery } from '#shared/schemas/common'
import { evaluation, evaluationAnswer } from '#shared/schemas/evaluate'
import { search, searchCreation } from '#shared/schemas/searches'
import { startedSweep, sweep, sweepCancellation, sweepCreation } from '#shared/schemas/sweeps'
import { partsAnswer, partsRequest } from '#shared/schemas/parts'
import { bitErrorCurves, candidateConstellation, candidateCurves, curvesQuery, informationCurves } from '#shared/schemas/values'
import { tagged } from './operation'

const stale = 'The row has another version now; `current` is the row as it is, `sent` the change.'
const rows = listOf(candidate)

export const candidateOperations = tagged('Candidates', {
  'GET /api/studies/:id/candidates': { summary: 'A page of the study\'s rows in the order of the grid.', query: pageQuery, answer: rows },
  'POST /api/studies/:id/candidates': {
    summary: 'Creates one row, or up to 2,000 in `items`: all of them or none. A study has at most 20,000 rows.',
    body: candidatesCreation, status: 201, answer: z.union([candidate, rows]),
  },
  'POST /api/studies/:id/candidates/delete': { summary: 'Deletes rows; they can be restored.', body: candidateSelection, status: 204 },
  'POST /api/studies/:id/candidates/restore': { summary: 'Brings deleted rows back to their places.', body: candidateSelection, answer: rows },
  'POST /api/studies/:id/candidates/duplicate': { summary: 'Copies rows behind the last of them.', body: candidateSelection, status: 201, answer: rows },
  'POST /api/studies/:id/candidates/move': { summary: 'Puts rows, in the order given, behind another one.', body: candidateMove, answer: rows },
  'PUT /api/studies/:id/pins': { summary: 'Pins a row to the overlay\'s lowest free slot of 12, or unpins it.', body: pinChange, answer: candidate },
  'GET /api/candidates/:id': { summary: 'One row.', answer: candidate },
  'PATCH /api/candidates/:id': {
    summary: 'Changes a row\'s inputs; its computed cells follow as an event.',
    body: candidateChange, answer: candidate, versioned: true, refusals: { 409: stale },
  },
  'DELETE /api/candidates/:id': { summary: 'Deletes a row; it can be restored.', status: 204, versioned: true, refusals: { 409: stale } },
  'POST /api/studies/:id/parts': {
    summary: 'Has columns that need heavy work (bit error rates, information rates, tolerances, frames, lower bounds, MAP) computed for rows that lack them; rows carry what there is of them in `parts`, and follow as events.',
    body: partsRequest, status: 202, answer: partsAnswer,
  },
  'GET /api/candidates/:id/curves': {
    summary: 'Curves of a row over its SNR range: SER, BER, or information rates. A row that lacks labels has no BER: 422 names the remedy.',
    query: curvesQuery, answer: z.union([candidateCurves, bitErrorCurves, informationCurves]), refusals: { 422: 'The row lacks what the curves need, such as labels.' },
  },
  'GET /api/candidates/:id/constellation': { summary: 'Points, labels, decision cells, and neighbours with their shares of the bound, of a row at unit mean energy; with each point\'s error probability at the available Es/N0.', answer: candidateConstellation },
})

export const sweepOperations = tagged('Sweeps', {
  'GET /api/studies/:id/sweeps': { summary: 'The study\'s sweeps, the newest first.', answer: listOf(sweep) },
  'POST /api/studies/:id/sweeps': {
    summary: 'Starts a sweep of at most 10,000 rows: lists and ranges of parameters multiplied out. Rows and progress follow as events. `leftOut` counts the combinations that make no row, and says why the first does not.',
    body: sweepCreation, status: 202, answer: startedSweep,
  },
  'DELETE /api/sweeps/:id': { summary: 'Cancels a sweep; rows without numbers are removed, the others stay.', answer: sweepCancellation },
})

export const searchOperations = tagged('Searches', {
  'POST /api/candidates/:id/searches': {
    summary: 'Begins a search from a row: for labels of a lower BER at the available Es/N0, or for parameters that need less SNR. How far it is follows as events; where it finds something better, that becomes a row behind this one whose note says how it was found.',
    body: searchCreation, status: 202, answer: search,
    refusals: { 422: 'The search or the row lacks something, such as labels or a start within the bounds; the message says what to change.' },
  },
  'GET /api/studies/:id/searches': { summary: 'The study\'s searches, the newest first; at most 200.', answer: listOf(search) },
  'DELETE /api/searches/:id': { summary: 'Cancels a search; what it has found is kept, and it may be resumed.', answer: search },
  'POST /api/searches/:id/resume': { summary: 'Goes on with a search that was cancelled or has failed, from where it stood.', answer: search },
})

export const evaluationOperations = tagged('Evaluation', {
  'POST /api/evaluate': {
    summary: 'Computes a constellation without saving anything. Points are taken as given, built-in families have unit mean energy.',
    body: evaluation, answer: evaluationAnswer,
    refusals: { 422: 'An input is not allowed, the constellation has no such quantity, or the evaluation costs too much; each message says what to change.' },
  },
})

export const serverOperations = tagged('Server', {
  'GET /api/health': {
    summary: 'Whether the server and its database work; 503 says what is wrong.',
    answer: z.object({ status: z.literal('ok'), version: z.string(), database: z.literal('ok') }),
  },
  'GET /api/openapi.json': { summary: 'This description.', media: 'application/json' },
})
