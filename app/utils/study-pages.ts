/** Pages of a study in the order of its row of links. `fills`: the page takes exactly the height that is left. */
export const studyPages = [
  { path: 'requirements', title: 'Requirements', fills: false },
  { path: 'candidates', title: 'Candidates', fills: true },
  { path: 'members', title: 'Members', fills: false },
  { path: 'history', title: 'History', fills: false },
] as const
export type StudyPage = (typeof studyPages)[number]

/** The study's page that an address shows, if it shows one. */
export function studyPageAt(path: string): StudyPage | undefined {
  return studyPages.find(page => new RegExp(`^/studies/[^/]+/${page.path}/?$`).test(path))
}
