import type { NestExpressApplication } from '@nestjs/platform-express';
import { DocumentBuilder, SwaggerModule, type OpenAPIObject } from '@nestjs/swagger';
import { problemSchema } from '@pegwell/shared/contract/errors';
import type { Request, Response } from 'express';
import { cleanupOpenApiDoc, createZodDto } from 'nestjs-zod';

class ProblemDto extends createZodDto(problemSchema) {}

/** `GET /api/openapi.json`: every route, described from the same schemas that check what comes in. */
export function serveOpenApi(app: NestExpressApplication): void {
  let document: string | undefined;
  app.use('/api/openapi.json', (_request: Request, response: Response) => {
    // Made at the first asking: reading every route takes longer than starting the server.
    document ??= JSON.stringify(describeApi(app));
    response.type('application/json').send(document);
  });
}

export function describeApi(app: NestExpressApplication): OpenAPIObject {
  const config = new DocumentBuilder()
    .setTitle('Pegwell')
    .setDescription('Plan, run and remember folk sessions around their tunings.')
    .setVersion('1')
    .addCookieAuth('pegwell')
    .build();
  const document = SwaggerModule.createDocument(app, config, { extraModels: [ProblemDto.Output] });
  return withProblems(cleanupOpenApiDoc(document));
}

/** Whatever is refused, on any route, is told in the same shape (RFC 9457). */
function withProblems(document: OpenAPIObject): OpenAPIObject {
  const refused = {
    description: 'Refused: problem details, with every place that is wrong.',
    content: { 'application/problem+json': { schema: { $ref: '#/components/schemas/ProblemDto_Output' } } },
  };
  for (const path of Object.values(document.paths)) {
    for (const method of ['get', 'post', 'put', 'patch', 'delete'] as const) {
      const operation = path[method];
      if (operation) operation.responses = { ...operation.responses, default: refused };
    }
  }
  return document;
}
