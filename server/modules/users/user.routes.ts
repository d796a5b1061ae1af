import { IdParams, PageQuery } from '../../../shared/schemas/common.ts';
import {
  CreateUser,
  PatchUser,
  User as UserAnswer,
  UserPage,
} from '../../../shared/schemas/user.ts';
import { toIso } from '../../../shared/time.ts';
import { reader, type Deps } from '../../deps.ts';
import { route, type Answer } from '../../middleware/route.ts';
import { tagOf } from '../../middleware/tags.ts';
import type { User } from './user.entity.ts';
import { createUser, getUser, listUsers, patchUser } from './user.service.ts';

const present = (user: User): UserAnswer => ({
  id: user.id,
  version: user.version,
  name: user.name,
  email: user.email,
  roles: user.roles,
  disabled: user.disabled,
  createdUtc: toIso(user.createdMs),
});
const answer = (user: User): Answer => ({
  body: present(user),
  etag: tagOf(user.id, user.version),
});

export const userRoutes = (deps: Deps) => [
  route({
    method: 'get',
    path: '/users',
    summary: 'People',
    access: 'session',
    action: 'see.users',
    query: PageQuery,
    answer: UserPage,
    handler: async ({ query }) => {
      const found = await listUsers(reader(deps), query);
      return { body: { items: found.items.map(present), nextCursor: found.nextCursor } };
    },
  }),
  route({
    method: 'get',
    path: '/users/:id',
    summary: 'One person',
    access: 'session',
    action: 'see.users',
    params: IdParams,
    answer: UserAnswer,
    handler: async ({ params }) => answer(await getUser(reader(deps), params.id)),
  }),
  route({
    method: 'post',
    path: '/users',
    summary: 'Give a person an account',
    access: 'session',
    action: 'edit.users',
    body: CreateUser,
    answer: UserAnswer,
    status: 201,
    handler: async ({ person, body }) => answer(await createUser(deps, person, body)),
  }),
  route({
    method: 'patch',
    path: '/users/:id',
    summary: 'Change name, roles, password, or disable',
    access: 'session',
    action: 'edit.users',
    params: IdParams,
    body: PatchUser,
    answer: UserAnswer,
    tagged: true,
    handler: async ({ person, params, body, ifMatch }) =>
      answer(await patchUser(deps, person, { id: params.id, wish: body, ifMatch })),
  }),
];
