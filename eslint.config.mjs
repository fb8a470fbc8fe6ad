import withNuxt from './.nuxt/eslint.config.mjs'

// Node 20 lacks Object.groupBy, which the composer behind withNuxt calls.
Object.groupBy ??= (items, keyOf) => {
  const groups = Object.create(null)
  items.forEach((item, index) => (groups[keyOf(item, index)] ??= []).push(item))
  return groups
}

export default withNuxt({
  rules: {
    '@stylistic/brace-style': ['error', '1tbs', { allowSingleLine: true }],
    'vue/max-attributes-per-line': ['error', { singleline: 4 }],
    'vue/singleline-html-element-content-newline': 'off',
  },
})
