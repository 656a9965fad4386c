import { Module, type DynamicModule, type Type } from '@nestjs/common';
import { APP_FILTER, APP_PIPE } from '@nestjs/core';
import { LoggerModule } from 'nestjs-pino';
import { AccessModule } from './access/access.module';
import { AccountsRoutesModule } from './accounts/accounts-routes.module';
import { CirclesModule } from './circles/circles.module';
import { ProblemFilter } from './common/problem.filter';
import { ZodPipe } from './common/zod.pipe';
import { DatabaseModule } from './database/database.module';
import { DemoModule } from './demo/demo.module';
import { ENV, type Env } from './env';
import { HealthController } from './health/health.controller';
import { LimitsModule } from './limits/limits.module';
import { LiveModule } from './live/live.module';
import { logging } from './logging';
import { MetricsModule } from './metrics/metrics.module';
import { OrderingModule } from './ordering/ordering.module';
import { RacksModule } from './racks/racks.module';
import { SessionsModule } from './sessions/sessions.module';
import { SheetsModule } from './sheets/sheets.module';
import { TunesModule } from './tunes/tunes.module';

/** Holds the parsed environment, so that every module can ask for it. */
@Module({})
export class AppModule {
  static with(env: Env, controllers: Type[] = []): DynamicModule {
    return {
      module: AppModule,
      imports: [
        {
          module: class EnvModule {},
          global: true,
          providers: [{ provide: ENV, useValue: env }],
          exports: [ENV],
        },
        LoggerModule.forRoot(logging(env)),
        DatabaseModule,
        LimitsModule,
        AccountsRoutesModule,
        CirclesModule,
        TunesModule,
        SessionsModule,
        OrderingModule,
        RacksModule,
        LiveModule,
        MetricsModule,
        SheetsModule,
        DemoModule,
        AccessModule,
      ],
      controllers: [HealthController, ...controllers],
      providers: [
        { provide: APP_FILTER, useClass: ProblemFilter },
        { provide: APP_PIPE, useClass: ZodPipe },
      ],
    };
  }
}
