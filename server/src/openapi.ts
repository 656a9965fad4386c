import type { NestExpressApplication } from '@nestjs/platform-express';
import { DocumentBuilder, SwaggerModule } from '@nestjs/swagger';
import type { Request, Response } from 'express';
import { cleanupOpenApiDoc } from 'nestjs-zod';

/** `GET /api/openapi.json`: every route, described from the same schemas that check what comes in. */
export function serveOpenApi(app: NestExpressApplication): void {
  const config = new DocumentBuilder()
    .setTitle('Pegwell')
    .setDescription('Plan, run and remember folk sessions around their tunings.')
    .setVersion('1')
    .addCookieAuth('pegwell')
    .build();
  let document: string | undefined;
  app.use('/api/openapi.json', (_request: Request, response: Response) => {
    // Made at the first asking: reading every route takes longer than starting the server.
    document ??= JSON.stringify(cleanupOpenApiDoc(SwaggerModule.createDocument(app, config)));
    response.type('application/json').send(document);
  });
}
