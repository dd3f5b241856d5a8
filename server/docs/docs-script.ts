/** Starts Swagger UI on our own document. No validator: it would ask another host. Resources
 * start closed: all operations at once take seconds to draw. */
export const DOCS_SCRIPT = `SwaggerUIBundle({
  url: '/api/openapi.json',
  dom_id: '#document',
  deepLinking: true,
  docExpansion: 'none',
  defaultModelsExpandDepth: 0,
  displayRequestDuration: false,
  filter: true,
  persistAuthorization: false,
  validatorUrl: null,
})
`
