import * as z from 'zod';
import { endpoint, id, instant, line, roomParams } from './endpoint';

/** How files of one layout are read and matched, kept under a name. */
export const fileProfile = z.object({ id, name: z.string(), usedAt: instant });
/** How files of one layout are read and matched. */
export type FileProfile = z.infer<typeof fileProfile>;

/** The room's profiles. */
export const listFileProfiles = endpoint({
  name: 'listFileProfiles',
  method: 'get',
  path: '/rooms/:roomId/logger-file-profiles',
  access: 'viewer',
  summary: 'How logger files of known layouts are read, by name',
  params: roomParams,
  reply: z.object({ profiles: z.array(fileProfile) }),
});

const profileParams = roomParams.extend({ profileId: id });

/** Gives a profile another name. */
export const renameFileProfile = endpoint({
  name: 'renameFileProfile',
  method: 'patch',
  path: '/rooms/:roomId/logger-file-profiles/:profileId',
  access: 'grower',
  summary: 'Rename a profile',
  params: profileParams,
  body: z.strictObject({ name: line(80) }),
  reply: fileProfile,
});

/** Forgets a profile; files that were read by it stay. */
export const removeFileProfile = endpoint({
  name: 'removeFileProfile',
  method: 'delete',
  path: '/rooms/:roomId/logger-file-profiles/:profileId',
  access: 'grower',
  summary: 'Forget a profile',
  params: profileParams,
});
