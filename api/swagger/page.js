window.addEventListener("DOMContentLoaded", () => {
  SwaggerUIBundle({
    url: "/openapi.json",
    dom_id: "#operations",
    deepLinking: true,
    validatorUrl: null,
    docExpansion: "list",
    defaultModelsExpandDepth: 0,
    presets: [SwaggerUIBundle.presets.apis],
  });
});
