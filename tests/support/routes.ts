import { existsSync, readdirSync, readFileSync } from 'node:fs';
import { join, relative } from 'node:path';
import { fileURLToPath } from 'node:url';
import ts from 'typescript';

const ROUTES = fileURLToPath(new URL('../../src/routes', import.meta.url));
const METHODS = ['GET', 'POST', 'PUT', 'PATCH', 'DELETE', 'OPTIONS', 'HEAD'];

export interface FoundRoute {
	/** As the framework names it: `/(staff)/queue`. */
	readonly id: string;
	readonly kind: 'page' | 'endpoint';
	/** Names of the form actions of a page; methods of an endpoint. */
	readonly entries: readonly string[];
}

/** Every route that the file tree has, with its form actions and methods read from the source. */
export function findRoutes(): FoundRoute[] {
	return foldersUnder(ROUTES).flatMap((folder): FoundRoute[] => {
		const id = `/${relative(ROUTES, folder)}`;
		const has = (name: string) => existsSync(join(folder, name));
		if (has('+server.ts')) {
			return [{ id, kind: 'endpoint', entries: exportedNames(join(folder, '+server.ts')) }];
		}
		if (!has('+page.svelte') && !has('+page.server.ts')) return [];
		const entries = has('+page.server.ts') ? actionNames(join(folder, '+page.server.ts')) : [];
		return [{ id, kind: 'page', entries }];
	});
}

function foldersUnder(folder: string): string[] {
	const inside = readdirSync(folder, { withFileTypes: true }).filter((entry) => entry.isDirectory());
	return [folder, ...inside.flatMap((entry) => foldersUnder(join(folder, entry.name)))];
}

function declarations(file: string): ts.VariableDeclaration[] {
	const source = ts.createSourceFile(file, readFileSync(file, 'utf8'), ts.ScriptTarget.ESNext, true);
	return source.statements.filter(ts.isVariableStatement).flatMap((statement) => {
		const isExported = statement.modifiers?.some(({ kind }) => kind === ts.SyntaxKind.ExportKeyword);
		return isExported ? [...statement.declarationList.declarations] : [];
	});
}

function exportedNames(file: string): string[] {
	const source = ts.createSourceFile(file, readFileSync(file, 'utf8'), ts.ScriptTarget.ESNext, true);
	const functions = source.statements
		.filter(ts.isFunctionDeclaration)
		.flatMap((declared) => declared.name?.text ?? []);
	const names = declarations(file).map(({ name }) => name.getText());
	return [...names, ...functions].filter((name) => METHODS.includes(name));
}

function actionNames(file: string): string[] {
	const actions = declarations(file).find(({ name }) => name.getText() === 'actions');
	if (actions === undefined) return [];
	let value = actions.initializer;
	while (value && (ts.isSatisfiesExpression(value) || ts.isAsExpression(value))) value = value.expression;
	if (!value || !ts.isObjectLiteralExpression(value)) {
		throw new Error(
			`${file}: the actions have to be written as one object, so that a test can read their names.`
		);
	}
	return value.properties.map((property) => {
		if (property.name === undefined) {
			throw new Error(`${file}: spread actions have no name that a test can read.`);
		}
		return ts.isStringLiteral(property.name) ? property.name.text : property.name.getText();
	});
}

/** The address of a route with its parameters filled in. */
export function addressOf(id: string, params: Readonly<Record<string, string>>): string {
	const path = id
		.split('/')
		.filter((part) => part !== '' && !/^\(.+\)$/.test(part))
		.map((part) =>
			part.replace(/\[([^\]=]+)(?:=[^\]]+)?\]/g, (_, name: string) => {
				const value = params[name];
				if (value === undefined) throw new Error(`Give the test a value for [${name}] of ${id}.`);
				return value;
			})
		)
		.join('/');
	return `/${path}`;
}
