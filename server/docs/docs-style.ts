/** Our ground, inks and type over the style of Swagger UI; the colours are tokens of the look, light. */
export const DOCS_STYLE = `
:root {
  color-scheme: light;
  --ground: #F8F5EE;
  --surface: #FDFCF7;
  --ink: #241E18;
  --ink2: #554F46;
  --rule: #D8D3C9;
  --edge: #867F74;
  --action: #005B63;
  --actionTint: #D8EDEE;
  --onAction: #FCFAF6;
  --danger: #911735;
}
@font-face {
  font-family: 'Fira Sans';
  font-weight: 400;
  src: url('./fonts/fira-sans-latin-400-normal.woff2') format('woff2');
}
@font-face {
  font-family: 'Fira Sans';
  font-weight: 500;
  src: url('./fonts/fira-sans-latin-500-normal.woff2') format('woff2');
}
body { margin: 0; background: var(--ground); color: var(--ink); font: 400 14px/20px 'Fira Sans', system-ui, sans-serif; }
.head { display: flex; flex-wrap: wrap; gap: 4px 24px; align-items: center; padding: 14px 24px; border-bottom: 1px solid var(--edge); }
.head a { color: var(--action); text-underline-offset: 3px; }
.head .name { color: var(--ink); font-size: 16px; font-weight: 500; text-decoration: none; }
:focus-visible { outline: 2px solid var(--action) !important; outline-offset: 2px; }
.swagger-ui, .swagger-ui :is(.info .title, .opblock-tag, .opblock .opblock-summary-operation-id, .opblock .opblock-summary-path,
  .opblock .opblock-summary-description, .opblock-description-wrapper p, .parameter__name, .parameter__type, .btn, label, table thead tr td,
  table thead tr th, .response-col_status, .response-col_links, .tab li, .model, .model-title, section.models h4, .scheme-container .schemes > label,
  .markdown p, .markdown li, .renderedMarkdown p, h4, h5) { font-family: 'Fira Sans', system-ui, sans-serif; color: var(--ink); }
.swagger-ui .wrapper { max-width: 1168px; padding: 0 24px; }
.swagger-ui .info { margin: 28px 0 12px; }
.swagger-ui .info .title { font-size: 36px; line-height: 44px; font-weight: 400; }
.swagger-ui .info .title small { background: none; }
.swagger-ui .info .title small pre, .swagger-ui .info .title small.version-stamp { background: none; color: var(--ink2); }
.swagger-ui .info .title small.version-stamp, .swagger-ui .info .base-url { display: none; }
.swagger-ui .info a, .swagger-ui a.nostyle:hover { color: var(--action); }
.swagger-ui :is(.markdown, .renderedMarkdown) code { background: none; color: var(--ink); padding: 0; font-weight: 400; }
.swagger-ui .scheme-container { background: none; box-shadow: none; padding: 12px 0; border-top: 1px solid var(--rule); }
.swagger-ui .opblock-tag { font-size: 18px; font-weight: 500; border-bottom: 1px solid var(--edge); }
.swagger-ui .opblock-tag small, .swagger-ui .opblock .opblock-summary-description { color: var(--ink2); }
.swagger-ui .opblock, .swagger-ui .opblock:is(.opblock-get, .opblock-post, .opblock-put, .opblock-patch, .opblock-delete) {
  background: none; border: 0; border-bottom: 1px solid var(--rule); border-radius: 0; box-shadow: none; margin: 0; }
.swagger-ui .opblock .opblock-summary, .swagger-ui .opblock.is-open .opblock-summary { border-color: var(--rule); }
.swagger-ui .opblock .opblock-summary .opblock-summary-method { min-width: 64px; background: none; color: var(--action); border: 1px solid var(--edge);
  border-radius: 4px; padding: 3px 0; font: 500 12px/16px 'Fira Sans', sans-serif; text-shadow: none; }
.swagger-ui .opblock-delete .opblock-summary .opblock-summary-method { color: var(--danger); }
.swagger-ui .opblock .opblock-summary-path { font-size: 14px; font-weight: 400; }
.swagger-ui .opblock .opblock-section-header { background: none; box-shadow: none; border-bottom: 1px solid var(--rule); }
.swagger-ui .opblock-body pre.microlight, .swagger-ui .highlight-code > .microlight { background: var(--surface) !important; color: var(--ink) !important; border: 1px solid var(--rule); border-radius: 4px; }
.swagger-ui .microlight span, .swagger-ui .microlight code { color: var(--ink) !important; }
.swagger-ui .btn { border: 1px solid var(--edge); border-radius: 4px; box-shadow: none; font-weight: 400; }
.swagger-ui .btn.authorize, .swagger-ui .btn.try-out__btn { border-color: var(--edge); color: var(--ink); }
.swagger-ui .btn.authorize svg { fill: var(--ink2); }
.swagger-ui .btn.execute { background: var(--action); border-color: var(--action); color: var(--onAction); }
.swagger-ui :is(input[type=text], input[type=password], textarea, select) { border: 1px solid var(--edge); border-radius: 4px; background: var(--surface);
  box-shadow: none; color: var(--ink); font-size: 14px; }
.swagger-ui .dialog-ux .modal-ux { border: 1px solid var(--ink); border-radius: 4px; box-shadow: none; background: var(--surface); }
.swagger-ui section.models { border: 0; border-top: 1px solid var(--edge); border-radius: 0; }
.swagger-ui section.models .model-container { background: none; border-bottom: 1px solid var(--rule); border-radius: 0; margin: 0; }
.swagger-ui .parameter__name.required::after, .swagger-ui .parameter__name.required span { color: var(--danger); }
.swagger-ui .prop-format, .swagger-ui .parameter__in { color: var(--ink2); }
`
