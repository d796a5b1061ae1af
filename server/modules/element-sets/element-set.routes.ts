import { IdParams, PageQuery } from '../../../shared/schemas/common.ts';
import {
  ElementSet as ElementSetAnswer,
  ElementSetPage,
  ElementSetQuery,
  ElementSetUpload,
  ElementSetUploadPage,
  UploadQuery,
  WithdrawElementSet,
} from '../../../shared/schemas/element-set.ts';
import { fromIso } from '../../../shared/time.ts';
import { reader, type Deps } from '../../deps.ts';
import { badRequest } from '../../errors.ts';
import { route } from '../../middleware/route.ts';
import { presentElementSet, presentUpload, presentUploadSummary } from './element-set.presenter.ts';
import {
  getUpload,
  listElementSets,
  listUploads,
  withdrawElementSet,
} from './element-set.service.ts';
import { uploadElementSets } from './upload.service.ts';

const uploadRoutes = (deps: Deps) => [
  route({
    method: 'post',
    path: '/element-set-uploads',
    summary: 'Upload a file of element sets (multipart field `file`); dryRun=true only judges it',
    access: 'session',
    action: 'upload.element-sets',
    upload: true,
    query: UploadQuery,
    answer: ElementSetUpload,
    status: 201,
    handler: async ({ person, query, file }) => {
      if (!file) throw badRequest('Send one file in the field named file.');
      const dryRun = query.dryRun === 'true';
      const { upload, repeated } = await uploadElementSets(deps, person, {
        file,
        dryRun,
        useFromMs: query.useFromUtc ? fromIso(query.useFromUtc) : null,
      });
      return { status: repeated || dryRun ? 200 : 201, body: presentUpload(upload, dryRun) };
    },
  }),
  route({
    method: 'get',
    path: '/element-set-uploads',
    summary: 'Uploaded files, newest first',
    access: 'session',
    action: 'upload.element-sets',
    query: PageQuery,
    answer: ElementSetUploadPage,
    handler: async ({ person, query }) => {
      const found = await listUploads(reader(deps), person, query);
      return {
        body: { items: found.items.map(presentUploadSummary), nextCursor: found.nextCursor },
      };
    },
  }),
  route({
    method: 'get',
    path: '/element-set-uploads/:id',
    summary: 'One upload, line by line',
    access: 'session',
    action: 'upload.element-sets',
    params: IdParams,
    answer: ElementSetUpload,
    handler: async ({ person, params }) => {
      const upload = await getUpload(reader(deps), person, params.id);
      return { body: presentUpload(upload, false) };
    },
  }),
];

const setRoutes = (deps: Deps) => [
  route({
    method: 'get',
    path: '/element-sets',
    summary: 'Element sets with age, newest epoch first',
    access: 'session',
    action: 'see.plan-side',
    query: ElementSetQuery,
    answer: ElementSetPage,
    handler: async ({ person, query }) => {
      const found = await listElementSets(reader(deps), person, query);
      const nowMs = deps.clock.now();
      const items = found.items.map((set) => presentElementSet(set, nowMs));
      return { body: { items, nextCursor: found.nextCursor } };
    },
  }),
  route({
    method: 'post',
    path: '/element-sets/:id/withdraw',
    summary: 'Withdraw a set: the one before is in use again, passes follow',
    access: 'session',
    action: 'withdraw.element-sets',
    params: IdParams,
    body: WithdrawElementSet,
    answer: ElementSetAnswer,
    handler: async ({ person, params, body }) => {
      const set = await withdrawElementSet(deps, person, { id: params.id, reason: body.reason });
      return { body: presentElementSet(set, deps.clock.now()) };
    },
  }),
];

export const elementSetRoutes = (deps: Deps) => [...uploadRoutes(deps), ...setRoutes(deps)];
