/** Only the declarations of this package are used: danfojs-node loads it in a browser alone. */

