import type { MethodsAnswer } from '#shared/schemas/methods'

/**
 * A formula as HTML. It goes to the browser once, in the page: what the server hands over beside the page (plugins/set-formula.ts) leaves
 * the HTML out, and null is then what stands there already.
 */
export class SetFormula {
  constructor(readonly html: string | null) {}
}

/** The answer of the API as the page holds it. */
export const pageOfMethods = (answer: MethodsAnswer) => ({
  ...answer,
  sections: answer.sections.map(section => ({
    ...section,
    methods: section.methods.map(method => ({
      ...method, formulas: method.formulas.map(({ case: which, html }) => ({ which, set: new SetFormula(html) })),
    })),
  })),
})
export type PageOfMethods = ReturnType<typeof pageOfMethods>
export type PageMethod = PageOfMethods['sections'][number]['methods'][number]
