/** The page around the API document. */
export const DOCS_PAGE = `<!doctype html>
<html lang="en">
<head>
<meta charset="utf-8">
<meta name="viewport" content="width=device-width, initial-scale=1">
<title>API · Beadwright</title>
<link rel="stylesheet" href="./swagger-ui.css">
<link rel="stylesheet" href="./beadwright.css">
<link rel="icon" href="data:,">
</head>
<body>
<header class="head">
<a class="name" href="/">Beadwright</a>
<a href="/account#keys">Your API keys</a>
<a href="/api/openapi.json">openapi.json</a>
</header>
<main id="document"><noscript>This page needs JavaScript; <a href="/api/openapi.json">openapi.json</a> does not.</noscript></main>
<script src="./swagger-ui-bundle.js"></script>
<script src="./beadwright.js"></script>
</body>
</html>
`
