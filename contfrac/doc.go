package contfrac
