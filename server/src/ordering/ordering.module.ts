import { Inject, Module, type OnApplicationBootstrap } from '@nestjs/common';
import { ENV, type Env } from '../env';
import { SessionsModule } from '../sessions/sessions.module';
import { OrderingController } from './ordering.controller';
import { OrderingService } from './ordering.service';
import { Solver } from './solver/solver';

@Module({
  imports: [SessionsModule],
  controllers: [OrderingController],
  providers: [OrderingService, { provide: Solver, useFactory: () => new Solver() }],
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
