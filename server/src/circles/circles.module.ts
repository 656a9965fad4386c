import { Module } from '@nestjs/common';
import { AccountsModule } from '../accounts/accounts.module';
import { CirclesController } from './circles.controller';
import { CirclesRepository } from './circles.repository';
import { CirclesService } from './circles.service';
import { UsualTuningsService } from './usual-tunings.service';

@Module({
  imports: [AccountsModule],
  controllers: [CirclesController],
  providers: [CirclesRepository, CirclesService, UsualTuningsService],
  exports: [CirclesService, UsualTuningsService],
})
export class CirclesModule {}
