import type { Circle, CreateCircle } from '@pegwell/shared/contract/circles';
import { api } from '../../../lib/api';

export const createCircle = (circle: CreateCircle) => api.post<Circle>('/circles', circle);
