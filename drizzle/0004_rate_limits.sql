CREATE TABLE `rate_limits` (
	`key` varchar(120) character set ascii collate ascii_bin NOT NULL,
	`points` int NOT NULL DEFAULT 0,
	`expire` bigint unsigned,
	CONSTRAINT `rate_limits_key` PRIMARY KEY(`key`)
);
