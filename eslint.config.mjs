import withNuxt from './.nuxt/eslint.config.mjs'

export default withNuxt({
  rules: {
    'vue/max-attributes-per-line': ['error', { singleline: 4 }],
    'vue/singleline-html-element-content-newline': 'off',
  },
})
