import { Injectable } from '@nestjs/common';

@Injectable()
export class DemoService {
  async seed(): Promise<void> {}
}
