import { getBoard } from '@shared/contracts/board';
import { route, type Route } from '../http/route';
import type { BoardService } from './board-service';

/**
 * The room's board over HTTP.
 *
 * @param boards - The service.
 * @returns Its routes.
 */
export function boardRoutes(boards: BoardService): Route[] {
  return [route(getBoard, ({ room }) => boards.board(room.id))];
}
