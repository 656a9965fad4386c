import { Inject, Module, type OnApplicationBootstrap } from '@nestjs/common';
import { ENV, type Env } from '../env';
import { SessionsModule } from '../sessions/sessions.module';
import { TunesModule } from '../tunes/tunes.module';
import { ExplainController } from './explain.controller';
import { ExplainService } from './explain.service';
import { OrderingController } from './ordering.controller';
import { OrderingService } from './ordering.service';
import { PricesController } from './prices.controller';
import { PricesService } from './prices.service';
import { Solver } from './solver/solver';

@Module({
  imports: [SessionsModule, TunesModule],
  controllers: [OrderingController, ExplainController, PricesController],
  providers: [
    OrderingService,
    ExplainService,
    PricesService,
    { provide: Solver, useFactory: () => new Solver() },
  ],
})
export class OrderingModule implements OnApplicationBootstrap {
  constructor(
    @Inject(ENV) private readonly env: Env,
    private readonly solver: Solver,
  ) {}

  onApplicationBootstrap(): void {
    // The first host who asks should not wait for a cold thread.
    if (this.env.production) this.solver.warm();
  }
}
